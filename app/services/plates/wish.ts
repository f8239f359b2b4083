import type { Wish } from "../../measurement/correction/wish.ts";

/** What a bench is asked for where nobody said; the measures that a plate shows do not depend on it. */
export const BENCH_WISH: Wish = { swr: 2, tolerance: 0.2 };
