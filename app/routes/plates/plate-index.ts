interface Row {
  publicId: string;
  number: number;
  version: number;
}

export type IndexLine<R extends Row> = R & { earlier: Pick<R, "publicId" | "version">[] };

/** A line a number, by number; on it the newest version, and the earlier ones newest first. Pure. */
export function indexOf<R extends Row>(rows: readonly R[]): IndexLine<R>[] {
  const byNumber = new Map<number, R[]>();
  for (const row of rows) byNumber.set(row.number, [...(byNumber.get(row.number) ?? []), row]);
  return [...byNumber.entries()]
    .sort(([a], [b]) => a - b)
    .map(([, versions]) => {
      const [newest, ...earlier] = versions.sort((a, b) => b.version - a.version);
      return { ...newest, earlier: earlier.map(({ publicId, version }) => ({ publicId, version })) };
    });
}
