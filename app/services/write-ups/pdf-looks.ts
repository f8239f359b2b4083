import { PAPER_PALETTE } from "~/charts/palette";

/** How a printed write-up looks. Families as `printPdf` knows them. */
export const SANS = "Atkinson Hyperlegible Next";
export const DISPLAY = "Bricolage Grotesque";
export const MONO = "Sometype Mono";

export const INK = PAPER_PALETTE.ink;
export const SOFT = PAPER_PALETTE.soft;
export const RULE = PAPER_PALETTE.rule;
export const FEN = PAPER_PALETTE.fen;
export const LAND = PAPER_PALETTE.land;

export const TEXT_SIZE = 10;
export const SMALL_SIZE = 8.5;
/** A4 less its margins, in points. */
export const TEXT_WIDTH = 595.28 - 2 * 64;
export const MARGINS: [number, number, number, number] = [64, 60, 64, 60];
