/** Where a thread stands: on a dip, on a sweep, or with neither on the project. Public ids. */
export interface ThreadPlace {
  dip?: string;
  sweep?: string;
}

/** What every part of a thread needs to know. */
export interface ThreadWhere {
  /** Public id of the project. */
  projectId: string;
  place: ThreadPlace;
  mayWrite: boolean;
}

export function notesPath({ projectId }: Pick<ThreadWhere, "projectId">, notePublicId?: string): string {
  return `/projects/${projectId}/notes${notePublicId ? `/${notePublicId}` : ""}`;
}

export function placeKey({ projectId, place }: ThreadWhere): string {
  if (place.dip) return `${projectId}:dip:${place.dip}`;
  return place.sweep ? `${projectId}:sweep:${place.sweep}` : projectId;
}
