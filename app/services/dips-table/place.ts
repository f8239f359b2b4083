/** Where a page of the table of dips ended, for whoever asks for the next one. Pure. */

export interface Place {
  /** Row id of its last dip. */
  id: number;
  /** How many dips came up to it. */
  count: number;
}

export function encodePlace({ id, count }: Place): string {
  return Buffer.from(`${count}|${id}`).toString("base64url");
}

/** Null for what is no place of ours. */
export function decodePlace(text: string): Place | null {
  const [, count, id] = /^(\d{1,9})\|(\d{1,15})$/.exec(Buffer.from(text, "base64url").toString()) ?? [];
  return count === undefined || id === undefined ? null : { id: Number(id), count: Number(count) };
}

/** Where in the ids, in their order of now, the next page begins; by the count where that dip is no longer among them. */
export function startBehind(ids: readonly number[], place: Place | null): number {
  if (!place) return 0;
  const at = ids.indexOf(place.id);
  return at >= 0 ? at + 1 : Math.min(place.count, ids.length);
}
