import type { PartsOffered } from "./parts.ts";

/** What a thread can stand on, as forms and addresses name it. */
export const PLACE_KINDS = ["dip", "sweep", "trail", "step", "bench"] as const;
export type PlaceKind = (typeof PLACE_KINDS)[number];

/** Where a thread stands: on one of these, or with none of them on the project. Public ids. */
export type ThreadPlace = Partial<Record<PlaceKind, string>>;

/** What every part of a thread needs to know. */
export interface ThreadWhere {
  /** Public id of the project. */
  projectId: string;
  place: ThreadPlace;
  mayWrite: boolean;
  /** On a sweep: what a note can speak of a part of. */
  parts?: PartsOffered;
}

export function notesPath({ projectId }: Pick<ThreadWhere, "projectId">, notePublicId?: string): string {
  return `/projects/${projectId}/notes${notePublicId ? `/${notePublicId}` : ""}`;
}

export function placeKey({ projectId, place }: ThreadWhere): string {
  const kind = kindOf(place);
  return kind ? `${projectId}:${kind}:${place[kind]}` : projectId;
}

/** "this dip", "the project": for labels. */
export function placeName(place: ThreadPlace): string {
  const kind = kindOf(place);
  return kind ? `${kind === "dip" ? "this" : "the"} ${kind}` : "the project";
}

/** The first kind that the place names: a dip's thread is the dip's, though its sweep is named too. */
export function kindOf(place: ThreadPlace): PlaceKind | undefined {
  return PLACE_KINDS.find((kind) => place[kind]);
}
