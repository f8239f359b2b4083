/** A line of words in which `backticks` set code apart. */
export function Words({ text }: { text: string }) {
  const parts = text.split("`");
  // biome-ignore lint/suspicious/noArrayIndexKey: a fixed text; the same word may be in it twice
  return parts.map((part, i) => (i % 2 === 1 ? <code key={`${i} ${part}`}>{part}</code> : part));
}
