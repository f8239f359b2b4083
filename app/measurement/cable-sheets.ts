import type { CableSheet } from "./cables.ts";

/** Published attenuation figures of common cables, a source each. */
export const CABLE_SHEETS: readonly CableSheet[] = [];
