/** Characters in one note, counted as a text field counts them. */
export const MAX_NOTE_CHARACTERS = 20_000;

/** Characters in one write-up: some fifteen printed pages; the parser's time grows with the square. */
export const MAX_WRITE_UP_CHARACTERS = 40_000;

/** Characters in the text of a verdict. */
export const MAX_VERDICT_CHARACTERS = 300;

/** For so long a removed note can be brought back by whoever removed it. */
export const UNDO_MS = 10_000;
