/** Where a page of a list ended, as an opaque text: the time that the list is ordered by, then the row. */
export interface Cursor {
  at: Date;
  id: number;
}

export function encodeCursor(cursor: Cursor): string {
  return Buffer.from(`${cursor.at.toISOString()}|${cursor.id}`).toString("base64url");
}

/** Undefined for what is no cursor of ours: the list then begins at its beginning. */
export function decodeCursor(text: string): Cursor | undefined {
  const [at, id] = Buffer.from(text, "base64url").toString().split("|");
  const date = new Date(at);
  return Number.isNaN(date.getTime()) || !/^\d+$/.test(id ?? "") ? undefined : { at: date, id: Number(id) };
}
