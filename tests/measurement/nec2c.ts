import { execFileSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { analyse } from "../../app/measurement/analyse.ts";
import { impedanceToGamma } from "../../app/measurement/reflection.ts";
import type { Dip } from "../../app/measurement/sweep.ts";

const PROGRAM = "/usr/bin/nec2c";

/** Debian's nec2c is there. */
export function hasNec(): boolean {
  return existsSync(PROGRAM);
}

/** Dips of a NEC-2 deck over another range than its own FR card says; nec2c prints five digits of frequency, so that is from the card. */
export function deckDips(deck: string, fromHz: number, toHz: number, stepHz: number): Dip[] {
  const count = Math.round((toHz - fromHz) / stepHz) + 1;
  const card = `FR 0 ${count} 0 0 ${(fromHz / 1e6).toFixed(6)} ${(stepHz / 1e6).toFixed(6)}`;
  const impedances = solve(deck.replace(/^FR .*$/m, card));
  if (impedances.length !== count) throw new Error(`${impedances.length} impedances of ${count}`);
  const gamma = impedances.map((z) => impedanceToGamma(z, 50));
  const sweep = {
    frequencyHz: Float64Array.from(gamma, (_, i) => fromHz + i * stepHz),
    magnitude: Float64Array.from(gamma, ({ re, im }) => Math.hypot(re, im)),
    gammaRe: Float64Array.from(gamma, ({ re }) => re),
    gammaIm: Float64Array.from(gamma, ({ im }) => im),
    ...{ referenceOhm: 50, plane: "antenna" as const },
  };
  return analyse(sweep).dips.filter(({ edge }) => !edge);
}

function solve(deck: string): { re: number; im: number }[] {
  const folder = mkdtempSync(path.join(tmpdir(), "swale-nec-"));
  try {
    const [input, output] = [path.join(folder, "in"), path.join(folder, "out")];
    writeFileSync(input, deck);
    execFileSync(PROGRAM, ["-i", input, "-o", output], { stdio: "ignore" });
    const lines = readFileSync(output, "latin1").split("\n");
    let wanted = false;
    return lines.flatMap((line) => {
      if (line.includes("ANTENNA INPUT PARAMETERS")) wanted = true;
      const cells = line.trim().split(/\s+/);
      if (!wanted || cells.length < 11 || !/^\d+$/.test(cells[0])) return [];
      wanted = false;
      return [{ re: Number(cells[6]), im: Number(cells[7]) }];
    });
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
