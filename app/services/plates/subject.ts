/** What a plate is of. Pure. */

export const PLATE_KINDS = ["sweep", "dip", "compare", "trail", "strip", "bench"] as const;
export type PlateKind = (typeof PLATE_KINDS)[number];

export interface PlateSubject {
  kind: PlateKind;
  /** Public ids: 2 to 8 sweeps of a comparison, none of the strip map, else one. */
  ids: string[];
}

/** Reads "sweep:ID", "dip:ID", "compare:ID,ID", "trail:ID", "strip" or "bench:ID"; null for anything else. */
export function subjectOf(from: string): PlateSubject | null {
  if (from === "strip") return { kind: "strip", ids: [] };
  const [, word, list] = SHAPE.exec(from) ?? [];
  const kind = PLATE_KINDS.find((known) => known === word);
  if (!kind || kind === "strip" || list === undefined) return null;
  const ids = [...new Set(list.split(","))];
  const right = kind === "compare" ? ids.length >= 2 && ids.length <= MOST_COMPARED : ids.length === 1;
  return right ? { kind, ids } : null;
}

/** The inverse of `subjectOf`. */
export function subjectText({ kind, ids }: PlateSubject): string {
  return ids.length === 0 ? kind : `${kind}:${ids.join(",")}`;
}

const SHAPE = /^([a-z]+):([0-9A-Za-z_-]{1,40}(?:,[0-9A-Za-z_-]{1,40})*)$/;
/** More lines than that can't be told apart on a sheet. */
export const MOST_COMPARED = 8;
