/** Two texts beside one another: what both say, and what only one says. */

export interface Part {
  text: string;
  /** Only this text has it. */
  own: boolean;
}

/** Word by word, by the longest sequence of words that both have; texts too long for that are each their own. */
export function difference(one: string, other: string): [Part[], Part[]] {
  const a = wordsOf(one);
  const b = wordsOf(other);
  if (a.length * b.length > MOST_PAIRS) return one === other ? same(one) : [own(one), own(other)];
  const shared = longest(a, b);
  return [marked(a, new Set(shared.map(([i]) => i))), marked(b, new Set(shared.map(([, j]) => j)))];
}

/** Words with the space after them. */
function wordsOf(text: string): string[] {
  return text.match(/\S+\s*|\s+/g) ?? [];
}

function longest(a: readonly string[], b: readonly string[]): [number, number][] {
  const width = b.length + 1;
  const lengths = new Uint32Array((a.length + 1) * width);
  for (let i = a.length - 1; i >= 0; i--) {
    for (let j = b.length - 1; j >= 0; j--) {
      lengths[i * width + j] = alike(a[i], b[j])
        ? lengths[(i + 1) * width + j + 1] + 1
        : Math.max(lengths[(i + 1) * width + j], lengths[i * width + j + 1]);
    }
  }
  const pairs: [number, number][] = [];
  for (let i = 0, j = 0; i < a.length && j < b.length; ) {
    if (alike(a[i], b[j])) pairs.push([i++, j++]);
    else if (lengths[(i + 1) * width + j] >= lengths[i * width + j + 1]) i++;
    else j++;
  }
  return pairs;
}

/** The space after a word is no difference. */
function alike(one: string, other: string): boolean {
  return one.trim() === other.trim();
}

function marked(words: readonly string[], shared: ReadonlySet<number>): Part[] {
  const parts: Part[] = [];
  for (const [i, text] of words.entries()) {
    const isOwn = !shared.has(i);
    const last = parts.at(-1);
    if (last && last.own === isOwn) last.text += text;
    else parts.push({ text, own: isOwn });
  }
  return parts;
}

function same(text: string): [Part[], Part[]] {
  const part = { text, own: false };
  return [[part], [part]];
}

function own(text: string): Part[] {
  return [{ text, own: true }];
}

/** A thousand words against a thousand: some milliseconds. */
const MOST_PAIRS = 1_000_000;
