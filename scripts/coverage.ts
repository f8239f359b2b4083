import { CLAIMS, type Count, coverage, FEWEST, type Region, WORST_CASES } from "./trials/coverage.ts";

/**
 * `npm run accuracy -- coverage [--json]`: how often the limits of dips hold the truth, on simulated sweeps,
 * by region. 1 where a share is outside what is accepted, else 0.
 *
 * Regions under FEWEST claims are told and not judged: their share is chance. A region where an interval holds
 * in less than 90 % gets sweeps of its own until ENOUGH claims, and then is judged as it stands. Of a method, for
 * which no sweep can be asked, and of the bench's limits a share may stray by three standard deviations of its bound.
 */
export function reportCoverage(json: boolean): number {
  const began = performance.now();
  const regions = coverage(SWEEPS, START, LEAST, ENOUGH);
  const faults = regions.flatMap(faultsOf);
  const seconds = (performance.now() - began) / 1000;
  if (json) {
    for (const region of regions) process.stdout.write(`${JSON.stringify(region)}\n`);
    process.stdout.write(`${JSON.stringify({ sweeps: SWEEPS, seconds, faults })}\n`);
    return faults.length > 0 ? 1 : 0;
  }
  process.stdout.write(`${HEAD}\n`);
  let by = "";
  for (const region of regions) {
    if (region.by !== by) process.stdout.write(`${region.by}\n`);
    by = region.by;
    process.stdout.write(`  ${row(region)}\n`);
  }
  for (const fault of faults) process.stdout.write(`Outside what is accepted: ${fault}\n`);
  process.stdout.write(`${SWEEPS} sweeps in ${seconds.toFixed(0)} s; ${NOTE}\n`);
  return faults.length > 0 ? 1 : 0;
}

/** What of a region is outside the accepted shares, in words. */
export function faultsOf({ by, range, ranges, counts }: Region): string[] {
  const faults: string[] = [];
  const judge = (claim: keyof Count, least: number, most: number, exact: boolean) => {
    const { made, held } = counts[claim];
    if (made < FEWEST) return;
    const share = held / made;
    const stray = (bound: number) => (exact ? 0 : 3) * Math.sqrt((bound * (1 - bound)) / made);
    if (share < least - stray(least) || share > most + stray(most))
      faults.push(`${claim} ${(100 * share).toFixed(1)} % of ${made}, ${by} ${range}`);
  };
  for (const claim of CLAIMS)
    judge(claim, by === "all" ? 0.93 : LEAST, by === "all" ? 0.97 : 1, ranges !== null);
  judge("benchAlone", 1, 1, true);
  for (const claim of WORST_CASES) judge(claim, 0.95, 1, false);
  return faults;
}

function row({ range, sweeps, counts }: Region): string {
  const shares = [...CLAIMS, ...WORST_CASES].map((claim) => {
    const { made, held } = counts[claim];
    return made === 0 ? "–".padStart(7) : ((100 * held) / made).toFixed(1).padStart(7);
  });
  return `${range.padEnd(44)}${String(sweeps).padStart(6)}  ${shares.join("")}`;
}

const SWEEPS = 12_000;
const START = 4;
/** No region under this. */
export const LEAST = 0.9;
/** A share of 90 % of so many claims is good to 0.7 %. */
export const ENOUGH = 2000;
const HEAD = `${"".padEnd(46)}sweeps  frequ.    SWR  width   SWR±  freq.± width±  bench
${"".padEnd(54)}95 % intervals        with the bench's limits  alone`;
const NOTE =
  "95 %: of what the bench shows; with the bench's limits (worst case around the 95 % interval), and these alone without scatter: of the antenna. Near SWR 1 the interval of the SWR is cut off at 1 and holds more often.";
