import type { Cause } from "../measurement/causes/cause.ts";

/** A cause's name among evidence: its kind, the antenna's part and the order, "part.a1b2.3". */
export function keyOf({ kind, part, order }: Pick<Cause, "kind" | "part" | "order">): string {
  return [kind, part ?? "", order ?? ""].join(".");
}

/** The antenna's part in such a key; null where the cause is none. */
export function partOf(key: string): string | null {
  return /^part\.([^.]+)\./.exec(key)?.[1] ?? null;
}
