/** A piece of a text around the words that were looked for, in parts that are marked or not. Pure; the page escapes. */

export interface SnippetPart {
  text: string;
  marked: boolean;
}

/** At most about `max` characters around the first word found; the beginning where none is. */
export function snippet(text: string, words: string[], max = 160): SnippetPart[] {
  const hits = findWords(text, words);
  const first = hits[0]?.start ?? 0;
  const start = first < max * 0.7 ? 0 : atWord(text, first - Math.floor(max * 0.35), 1);
  const end = start + max >= text.length ? text.length : atWord(text, start + max, -1);
  const parts: SnippetPart[] = [];
  const put = (piece: string, marked: boolean) => {
    if (piece) parts.push({ text: piece, marked });
  };
  put(start > 0 ? "… " : "", false);
  let at = start;
  for (const hit of hits) {
    if (hit.start < at || hit.end > end) continue;
    put(text.slice(at, hit.start), false);
    put(text.slice(hit.start, hit.end), true);
    at = hit.end;
  }
  put(text.slice(at, Math.max(at, end)), false);
  put(end < text.length ? " …" : "", false);
  return parts;
}

/** Where words of the text begin with one of `words`, letters compared without case and accents. */
function findWords(text: string, words: string[]): { start: number; end: number }[] {
  const folded = words.map(fold).filter(Boolean);
  const hits: { start: number; end: number }[] = [];
  for (const { 0: word, index } of text.matchAll(/[\p{L}\p{N}\p{M}_]+/gu)) {
    const plain = fold(word);
    if (folded.some((wanted) => plain.startsWith(wanted)))
      hits.push({ start: index, end: index + word.length });
  }
  return hits;
}

function fold(text: string): string {
  return text.normalize("NFD").replace(/\p{M}/gu, "").toLowerCase();
}

/** The nearest place before or after `at` where a word ends; `at` itself, between characters, where none is near. */
function atWord(text: string, at: number, way: 1 | -1): number {
  for (let i = 0; i < LONGEST_STEP; i++) {
    if (/\s/.test(text[at + way * i] ?? " ")) return at + way * i + (way > 0 ? 1 : 0);
  }
  return /[\udc00-\udfff]/.test(text[at] ?? "") ? at + 1 : at;
}

const LONGEST_STEP = 24;
