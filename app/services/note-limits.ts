/** Characters in one note, counted as a text field counts them. */
export const MAX_NOTE_CHARACTERS = 20_000;

/** Characters in the text of a verdict. */
export const MAX_VERDICT_CHARACTERS = 300;
