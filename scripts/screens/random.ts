/** Repeatable random numbers: mulberry32 (T. Ettinger, public domain; from memory). */
export interface Random {
  next: () => number;
  between: (low: number, high: number) => number;
  whole: (low: number, high: number) => number;
  chance: (share: number) => boolean;
  pick: <T>(items: readonly T[]) => T;
}

export function randomFrom(start: number): Random {
  let state = start >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  return {
    next,
    between: (low, high) => low + (high - low) * next(),
    whole: (low, high) => Math.floor(low + (high - low + 1) * next()),
    chance: (share) => next() < share,
    pick: (items) => items[Math.floor(next() * items.length)],
  };
}
