import type { Sweep } from "../sweep.ts";
import { correctFully } from "./correct-fully.ts";
import { correctScalar } from "./correct-scalar.ts";
import { type Corrected, none } from "./corrected.ts";
import { referenceFaults } from "./faults.ts";
import type { BenchForCorrection } from "./references.ts";
import { outcomeFaults, type ReadAs } from "./scale-faults.ts";

/**
 * A sweep referred to the bench's test port (MEASUREMENT section 4).
 *
 * With phase everywhere (sweep, open, short, load): the three-term correction. Else abs Γ over the 0 dB line of open
 * and short, of one of them, or of the level that was given. Else the sweep as it is, kind "none". Grids may differ:
 * references are interpolated (real and imaginary part, or amplitude) and never extrapolated: outside their range the
 * value is NaN, and `correction` says the range. `sweep.benchLimits` come along, NaN where a limit is not known. Every
 * doubt on the references is a warning; none of them is corrected silently. `readAs` lets the way the files were read
 * be compared. Never throws.
 */
export function correctSweep(sweep: Sweep, bench: BenchForCorrection, readAs: ReadAs = {}): Corrected {
  const faults = referenceFaults(sweep, bench.references, readAs);
  const { zeroDb } = bench.given;
  const shift = zeroDb === null ? null : zeroDb - (readAs.sweep?.zeroDb ?? 0);
  const done = correctFully(sweep, bench) ?? correctScalar(sweep, bench, shift);
  if (done.correction.kind === "none") return { ...done, warnings: [...faults, ...done.warnings] };
  if (done.sweep.magnitude.every(Number.isNaN)) return none(sweep, ...faults, ...done.warnings);
  return { ...done, warnings: [...faults, ...done.warnings, ...outcomeFaults(done.sweep.magnitude)] };
}
