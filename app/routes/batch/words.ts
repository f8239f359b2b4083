/** `1 row`, `12 rows`, `no rows`. */
export function countOf(n: number, thing: string): string {
  return n === 1 ? `1 ${thing}` : `${n === 0 ? "no" : n.toLocaleString("en")} ${thing}s`;
}
