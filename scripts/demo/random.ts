/**
 * Numbers that look drawn by chance and are the same every time: the 32-bit mixing generator "mulberry32"
 * (public domain, T. Ettinger; from memory, not seen). `name` chooses the sequence.
 */
export function randomBy(name: string): () => number {
  let state = 0;
  for (const character of name) state = (Math.imul(state, 31) + character.charCodeAt(0)) | 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Normal with mean 0 and deviation 1, by Box and Muller. */
export function gaussBy(name: string): () => number {
  const random = randomBy(name);
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}
