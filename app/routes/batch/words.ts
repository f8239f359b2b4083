/** `1 row`, `12 rows`, `no rows`. */
export function countOf(n: number, thing: string): string {
  return n === 1 ? `1 ${thing}` : `${n === 0 ? "no" : n.toLocaleString("en")} ${thing}s`;
}

/** Of a control that chooses files: its button in our own look. */
export const FILE_LOOK =
  "max-w-full py-1 file:mr-2.5 file:min-h-9 file:cursor-pointer file:rounded-base file:border file:border-edge file:bg-paper file:px-3 file:py-1 file:text-small file:font-semibold";
