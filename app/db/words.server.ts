import { and, or, type SQL, sql } from "drizzle-orm";
import type { AnyMySqlColumn } from "drizzle-orm/mysql-core";

/** The columns of one FULLTEXT index, in its order. */
type Indexed = AnyMySqlColumn[];

/**
 * True where every word begins a word in one of the indexed texts. Words must be letters, digits and underscores only
 * (`searchWords`): nothing in them means anything in a boolean query or a pattern.
 */
export function hasWords(words: string[], ...texts: Indexed[]): SQL | undefined {
  return and(...words.map((word) => or(...texts.map((columns) => beginsWord(word, columns)))));
}

/** The same for a text that has no index. */
export function textHasWords(words: string[], text: SQL): SQL | undefined {
  return and(...words.map((word) => sql`${text} regexp ${patternOf(word)}`));
}

function beginsWord(word: string, columns: Indexed): SQL {
  if (isIndexed(word)) {
    const list = sql.join(columns, sql`, `);
    return sql`match (${list}) against (${`+${word}*`} in boolean mode)`;
  }
  return sql`concat_ws(' ', ${sql.join(columns, sql`, `)}) regexp ${patternOf(word)}`;
}

function patternOf(word: string): string {
  return `(?i)(?<![\\p{L}\\p{N}_])${word}`;
}

function isIndexed(word: string): boolean {
  const length = Array.from(word).length;
  return length >= SHORTEST && length <= LONGEST && !NOT_INDEXED.has(word);
}

/** What InnoDB's own index leaves out: its defaults for `innodb_ft_min_token_size`, `…_max_…` and the stopword list. */
const SHORTEST = 3;
const LONGEST = 84;
const NOT_INDEXED = new Set(
  "about are com for from how that the this was what when where who will with und www".split(" "),
);
