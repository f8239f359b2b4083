/** Colours for drawings: the page's tokens, or the plain values where no style sheet reaches. */

export interface Palette {
  paper: string;
  surface: string;
  land: string;
  ink: string;
  soft: string;
  rule: string;
  edge: string;
  fen: string;
  heather: string;
  /** Only for lines beside others: no kind of colour blindness joins it to clay, fen or ink. */
  iris: string;
  clay: string;
  moss: string;
  wash: string;
  water: string;
  allocation: string;
  sansFont: string;
  displayFont: string;
  monoFont: string;
}

const COLOURS = [
  "paper",
  "surface",
  "land",
  "ink",
  "soft",
  "rule",
  "edge",
  "fen",
  "heather",
  "iris",
  "clay",
  "moss",
  "wash",
  "water",
  "allocation",
] as const;

const PLAIN_FONTS = {
  sansFont: "Atkinson Hyperlegible Next, sans-serif",
  displayFont: "Bricolage Grotesque, sans-serif",
  monoFont: "Sometype Mono, monospace",
};

/** For pages: follows the theme. */
export const PAGE_PALETTE: Palette = {
  ...(Object.fromEntries(COLOURS.map((name) => [name, `var(--color-${name})`])) as Record<
    (typeof COLOURS)[number],
    string
  >),
  sansFont: "var(--font-sans)",
  displayFont: "var(--font-display)",
  monoFont: "var(--font-mono)",
};

/** For mails, plates and pictures: the light tokens of app.css (a test compares them). */
export const PAPER_PALETTE: Palette = {
  paper: "#f6f2e8",
  surface: "#fffdf7",
  land: "#e7dfca",
  ink: "#1e2a2b",
  soft: "#55615f",
  rule: "#d8d0bd",
  edge: "#857d68",
  fen: "#1f6f63",
  heather: "#7b4b86",
  iris: "#7a2fd0",
  clay: "#994a25",
  moss: "#4f6827",
  wash: "#d6e6dd",
  water: "#c9dbe0",
  allocation: "#8d846c",
  ...PLAIN_FONTS,
};

/** The same for a dark ground. */
export const PEAT_PALETTE: Palette = {
  paper: "#171c1a",
  surface: "#202723",
  land: "#2a332e",
  ink: "#e9e6da",
  soft: "#a7afa6",
  rule: "#38413c",
  edge: "#75807a",
  fen: "#63c2b0",
  heather: "#c79ad2",
  iris: "#a884f0",
  clay: "#e39a6c",
  moss: "#a9c46c",
  wash: "#24453e",
  water: "#25414a",
  allocation: "#7f8a82",
  ...PLAIN_FONTS,
};
