import type { Warning } from "../measurement/sweep.ts";

/** Rounding of a printed value; anything above is noise or calibration. */
const ROUNDING = 1e-9;

/** What is odd in the points of a sweep that was read: gaps, and abs Γ over 1. */
export function pointWarnings(magnitude: Float64Array): Warning[] {
  let gaps = 0;
  let over = 0;
  for (const m of magnitude) {
    if (Number.isNaN(m)) gaps++;
    else if (m > 1 + ROUNDING) over++;
  }
  const warnings: Warning[] = [];
  if (gaps > 0)
    warnings.push({ code: "gaps", message: `${counted(gaps, "point")} without a value: left as gaps.` });
  if (over > 0)
    warnings.push({
      code: "over-unity",
      message: `${counted(over, "point")} with abs Γ over 1 (noise or calibration): kept as they are, without an SWR.`,
    });
  return warnings;
}

/** "1 point", "2 points". */
export function counted(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? "" : "s"}`;
}
