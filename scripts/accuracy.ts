import { existsSync, readFileSync } from "node:fs";
import { closePictureReader } from "../app/services/picture.server.ts";
import { printCauses } from "./accuracy-causes.ts";
import { trails } from "./accuracy-trails.ts";
import { reportCoverage } from "./coverage.ts";
import type { PhotographTruth } from "./screens/photographs.ts";
import { type PictureScore, scorePicture, totals, traceRight, truthsIn } from "./screens/score.ts";
import { photographTotals, scorePhotograph, shaken } from "./screens/score-photograph.ts";

/**
 * `npm run accuracy -- screens [FOLDER] [--given] [--json]`: how well pictures are read, against their truth.
 * `npm run accuracy -- causes [--json]`: origins of dips and trims on NEC-2 antennas (`accuracy-causes.ts`).
 * `npm run accuracy -- trails [--json]`: dips followed through invented histories (`accuracy-trails.ts`).
 * `npm run accuracy -- photographs`: photographs by four corners and axes, with exact corners and 1 px off.
 * `npm run accuracy -- coverage [--json]`: how often the limits of dips hold the truth, on simulated sweeps.
 *
 * Exit code: 0; 1 where a share is below the last accepted table's; 2 for usage and parts that are not there yet.
 */
const FIXTURES = new URL("../tests/fixtures/screens/", import.meta.url).pathname;
const PHOTOGRAPHS = new URL("../tests/fixtures/photographs/", import.meta.url).pathname;
/** What reading from whole pixels can miss without any other fault. */
const QUANTISATION_PX = 0.5;
const PARTS = ["screens", "photographs", "coverage", "causes", "trails"];
const NAMES = ["frame", "axes", "trace", "dips"] as const;
const USAGE =
  "Usage: npm run accuracy -- screens|photographs|coverage|causes|trails [FOLDER] [--given] [--json]";

process.exitCode = await main(process.argv.slice(2));

async function main(args: string[]): Promise<number> {
  const [part, folder = `${FIXTURES}pictures`] = args.filter((a) => !a.startsWith("--"));
  const flags = args.filter((a) => a.startsWith("--"));
  if (!PARTS.includes(part) || flags.some((f) => f !== "--json" && f !== "--given")) {
    process.stderr.write(`${USAGE}\n`);
    return 2;
  }
  if (part === "photographs") return photographs(flags.includes("--json"));
  if (part === "causes") return printCauses(flags.includes("--json"));
  if (part === "trails") return trails(flags.includes("--json"));
  if (part === "coverage") return reportCoverage(flags.includes("--json"));
  if (part !== "screens") {
    process.stderr.write(`${part}: not available yet.\n`);
    return 2;
  }
  if (!existsSync(folder)) {
    process.stderr.write(`${folder} is not there.\n`);
    return 2;
  }
  const given = flags.includes("--given");
  const json = flags.includes("--json");
  const scores: PictureScore[] = [];
  for (const truth of truthsIn(folder)) {
    const score = await scorePicture(folder, truth, given);
    scores.push(score);
    process.stdout.write(`${json ? JSON.stringify(score) : row(score)}\n`);
  }
  await closePictureReader();
  const now = totals(scores);
  const accepted = folder === `${FIXTURES}pictures` ? acceptedShares(given ? "given" : "nothing") : null;
  process.stdout.write(
    `${json ? JSON.stringify({ total: now, accepted, medianPx: medianOf(scores) }) : summary(scores, now, accepted)}\n`,
  );
  return accepted && NAMES.some((name) => now[name] < accepted[name] - 1e-9) ? 1 : 0;
}

type Shares = ReturnType<typeof totals>;

function acceptedShares(mode: "nothing" | "given"): Shares | null {
  const path = `${FIXTURES}accepted.json`;
  return existsSync(path) ? JSON.parse(readFileSync(path, "utf8"))[mode] : null;
}

function row(score: PictureScore): string {
  const px = (v: number | null) => (v === null ? "  –  " : v.toFixed(2).padStart(5));
  const mark = (right: boolean) => (right ? "yes" : "NO ");
  const dips = `${score.dipsFound}/${score.dipsTrue}${score.dipsExtra ? ` +${score.dipsExtra}` : ""}`;
  return [
    score.file.padEnd(18),
    score.skin.padEnd(16),
    score.degraded.join(",").padEnd(22),
    `frame ${px(score.framePx)}`,
    `axes ${mark(score.axesRight)}`,
    `trace ${mark(traceRight(score))} ${px(score.traceMedianPx)}/${px(score.traceP95Px)}`,
    `of ½ px ${px(score.traceMedianPx === null ? null : score.traceMedianPx / QUANTISATION_PX)}`,
    `dips ${mark(score.dipsRight)} ${dips}`,
    score.error ?? "",
  ]
    .join("  ")
    .trimEnd();
}

/** The pictures' median misses: their median, pixels; null where none is comparable. */
function medianOf(scores: PictureScore[]): number | null {
  const medians = scores.map((s) => s.traceMedianPx).filter((v) => v !== null);
  return medians.sort((a, b) => a - b)[medians.length >> 1] ?? null;
}

async function photographs(json: boolean): Promise<number> {
  const accepted = JSON.parse(readFileSync(`${PHOTOGRAPHS}accepted.json`, "utf8"));
  let worse = false;
  for (const corners of ["exact", "shaken"] as const) {
    const scores: PictureScore[] = [];
    for (const [i, truth] of (truthsIn(`${PHOTOGRAPHS}pictures`) as PhotographTruth[]).entries()) {
      const at = corners === "exact" ? truth.corners : shaken(truth.corners, i);
      const score = await scorePhotograph(`${PHOTOGRAPHS}pictures`, truth, at);
      scores.push(score);
      process.stdout.write(`${json ? JSON.stringify({ corners, ...score }) : row(score)}\n`);
    }
    const now = photographTotals(scores);
    worse ||= now.trace < accepted[corners].trace || now.dips < accepted[corners].dips;
    process.stdout.write(`${JSON.stringify({ corners, total: now, accepted: accepted[corners] })}\n`);
  }
  await closePictureReader();
  return worse ? 1 : 0;
}

function summary(scores: PictureScore[], now: Shares, accepted: Shares | null): string {
  const shares = NAMES.map((name) => {
    const before = accepted ? ` (accepted ${(100 * accepted[name]).toFixed(1)} %)` : "";
    return `${name} ${(100 * now[name]).toFixed(1)} %${before}`;
  });
  const median = medianOf(scores);
  const floor =
    median === null ? "" : `${median.toFixed(2)} px, ${(median / QUANTISATION_PX).toFixed(2)} of ½ px`;
  return `of ${scores.length}: ${shares.join(", ")}; median trace miss over the pictures ${floor || "unknown"}`;
}
