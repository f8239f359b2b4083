import { existsSync, readFileSync } from "node:fs";
import { closePictureReader } from "../app/services/picture.server.ts";
import { type PictureScore, scorePicture, totals, traceRight, truthsIn } from "./screens/score.ts";

/**
 * `npm run accuracy -- screens [FOLDER] [--given] [--json]`: how well pictures are read, against their truth.
 *
 * Exit code: 0; 1 where a share is below the last accepted table's; 2 for usage and parts that are not there yet.
 */
const FIXTURES = new URL("../tests/fixtures/screens/", import.meta.url).pathname;
const PARTS = ["screens", "coverage", "causes", "trails"];
const NAMES = ["frame", "axes", "trace", "dips"] as const;
const USAGE = "Usage: npm run accuracy -- screens|coverage|causes|trails [FOLDER] [--given] [--json]";

process.exitCode = await main(process.argv.slice(2));

async function main(args: string[]): Promise<number> {
  const [part, folder = `${FIXTURES}pictures`] = args.filter((a) => !a.startsWith("--"));
  const flags = args.filter((a) => a.startsWith("--"));
  if (!PARTS.includes(part) || flags.some((f) => f !== "--json" && f !== "--given")) {
    process.stderr.write(`${USAGE}\n`);
    return 2;
  }
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
    `${json ? JSON.stringify({ total: now, accepted }) : summary(scores.length, now, accepted)}\n`,
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
    `dips ${mark(score.dipsRight)} ${dips}`,
    score.error ?? "",
  ]
    .join("  ")
    .trimEnd();
}

function summary(count: number, now: Shares, accepted: Shares | null): string {
  const shares = NAMES.map((name) => {
    const before = accepted ? ` (accepted ${(100 * accepted[name]).toFixed(1)} %)` : "";
    return `${name} ${(100 * now[name]).toFixed(1)} %${before}`;
  });
  return `of ${count}: ${shares.join(", ")}`;
}
