import { readFileSync } from "node:fs";
import { afterAll, describe, expect, it } from "vitest";
import { closePictureReader } from "../../../app/services/picture.server.ts";
import type { PhotographTruth } from "../../../scripts/screens/photographs.ts";
import { type PictureScore, truthsIn } from "../../../scripts/screens/score.ts";
import { photographTotals, scorePhotograph, shaken } from "../../../scripts/screens/score-photograph.ts";

/**
 * Invented screens, photographed at an angle under unequal light with moiré, blur, noise and JPEG: read by four
 * corners and the axes, against the last accepted table. Misses in pixels of the plot laid flat.
 */
const FIXTURES = new URL("../../fixtures/photographs/", import.meta.url).pathname;
const ACCEPTED = JSON.parse(readFileSync(`${FIXTURES}accepted.json`, "utf8"));
const TRUTHS = truthsIn(`${FIXTURES}pictures`) as PhotographTruth[];
/** Decoders differ a little between machines: one photograph of the set may. */
const SLACK = 1.01 / TRUTHS.length;
const SLACK_PX = 0.05;

afterAll(closePictureReader);

describe("accuracy of reading photographs", () => {
  it("has twenty of them", () => expect(TRUTHS).toHaveLength(20));

  for (const corners of ["exact", "shaken"] as const) {
    it(`is no worse than accepted with ${corners} corners`, { timeout: 120_000 }, async () => {
      const scores: PictureScore[] = [];
      for (const [i, truth] of TRUTHS.entries()) {
        const at = corners === "exact" ? truth.corners : shaken(truth.corners, i);
        scores.push(await scorePhotograph(`${FIXTURES}pictures`, truth, at));
      }
      const now = photographTotals(scores);
      expect(now.trace).toBeGreaterThanOrEqual(ACCEPTED[corners].trace - SLACK);
      expect(now.dips).toBeGreaterThanOrEqual(ACCEPTED[corners].dips - SLACK);
      expect(now.medianPx).toBeLessThanOrEqual(ACCEPTED[corners].medianPx + SLACK_PX);
    });
  }
});
