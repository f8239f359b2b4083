import type { Word } from "./picture.ts";

/** Words that stand in one printed row, from left to right. */
export interface Row {
  text: string;
  words: Word[];
  top: number;
  bottom: number;
}

/** Groups words into rows by the overlap of their heights, top to bottom. */
export function rowsOf(words: Word[]): Row[] {
  const rows: Row[] = [];
  for (const word of [...words].sort((a, b) => a.top - b.top)) {
    const middle = (word.top + word.bottom) / 2;
    const row = rows.find((r) => middle > r.top && middle < r.bottom);
    if (row) row.words.push(word);
    else rows.push({ text: "", words: [word], top: word.top, bottom: word.bottom });
  }
  for (const row of rows) {
    row.words.sort((a, b) => a.left - b.left);
    row.text = row.words.map((w) => w.text).join(" ");
  }
  return rows;
}

/** The number of single-letter changes between two words, up to 3. */
export function lettersApart(a: string, b: string): number {
  if (Math.abs(a.length - b.length) > 2) return 3;
  let previous = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = a[i - 1] === b[j - 1] ? 0 : 1;
      current.push(Math.min(previous[j] + 1, current[j - 1] + 1, previous[j - 1] + change));
    }
    previous = current;
  }
  return previous[b.length];
}
