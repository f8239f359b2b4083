/** The order of a table, as it stands in an address. */
export interface Sort {
  key: string;
  direction: "ascending" | "descending";
}

/** Reads `frequency` or `-frequency`; anything that is not an allowed key gives the fallback. */
export function parseSort(param: string | null, allowed: readonly string[], fallback: Sort): Sort {
  if (!param) return fallback;
  const descending = param.startsWith("-");
  const key = descending ? param.slice(1) : param;
  return allowed.includes(key) ? { key, direction: descending ? "descending" : "ascending" } : fallback;
}

/** The parameter a press on a column's head leads to: ascending first, then the other way round. */
export function nextSort(key: string, current: Sort): string {
  return current.key === key && current.direction === "ascending" ? `-${key}` : key;
}

/** A sorted copy; stable; null and NaN come last in either direction. */
export function sortRows<Row>(
  rows: readonly Row[],
  by: (row: Row) => number | string | null,
  direction: Sort["direction"],
): Row[] {
  const sign = direction === "ascending" ? 1 : -1;
  return [...rows].sort((a, b) => {
    const left = by(a);
    const right = by(b);
    if (isMissing(left) || isMissing(right)) return Number(isMissing(left)) - Number(isMissing(right));
    return sign * compare(left, right);
  });
}

function isMissing(value: number | string | null): value is null {
  return value === null || Number.isNaN(value);
}

function compare(left: number | string, right: number | string): number {
  if (typeof left === "number" && typeof right === "number") return left < right ? -1 : Number(left > right);
  return String(left).localeCompare(String(right), "en", { numeric: true });
}
