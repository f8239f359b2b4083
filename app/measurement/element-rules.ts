import type { ElementKind } from "./antenna.ts";

/** What carries the wave: quarter waves, half waves, or whole waves around a loop. */
export type Series = "quarter" | "half" | "loop";

/** How a kind of part resonates. */
export interface Rule {
  series: Series;
  /** 2: odd orders only. */
  step: 1 | 2;
  /** The first order; 2 with a step of 2 for even ones. */
  first: 1 | 2;
  /** Half-width of k at order 1. */
  spread: number;
  weight: number;
  condition: string;
}

/** 234 ft·MHz × 4 / c. */
export const WIRE_K = 0.9516;
/** 1005 ft·MHz / c. */
export const LOOP_K = 1.0218;
/** Insulated wire is slower: 0.95 to 0.99 of a bare one (common practice, no source). */
export const COVERED = 0.97;
/**
 * Half-widths of k at order 1. 0.92 to 0.99 seen for verticals and dipoles from thin wire to tube; masts and guys carry
 * fittings, and the outside of a cable ends in unknown ways.
 */
const CLEAN = 0.04;
export const LOOSE = 0.06;
/**
 * How usual: what is fed; what is joined or near; what needs something unusual. Chosen, not fitted; in tests/fixtures/nec 152 of 182
 * dips are of what is fed.
 */
const FED = 1;
export const PARASITE = 0.4;
export const RARE = 0.15;
const usual = { condition: "", first: 1 } as const;
const grounded: Rule = { ...usual, series: "quarter", step: 2, spread: LOOSE, weight: PARASITE };
const floating: Rule = { ...usual, series: "half", step: 1, spread: LOOSE, weight: PARASITE };

/** The usual case of each kind first. */
export const RULES: Record<ElementKind, Rule[]> = {
  vertical: [{ ...usual, series: "quarter", step: 2, spread: CLEAN, weight: FED }],
  dipole: [
    { ...usual, series: "half", step: 2, spread: CLEAN, weight: FED },
    { series: "half", step: 2, first: 2, spread: CLEAN, weight: RARE, condition: "if it is not balanced" },
  ],
  loop: [{ ...usual, series: "loop", step: 1, spread: CLEAN, weight: FED }],
  radial: [{ ...usual, series: "quarter", step: 2, spread: LOOSE, weight: PARASITE }],
  mast: [grounded, { ...floating, weight: RARE, condition: "if its foot is insulated" }],
  guy: [floating, { ...grounded, weight: RARE, condition: "if one end is grounded" }],
  wire: [floating, { ...grounded, weight: RARE, condition: "if one end is grounded" }],
};
