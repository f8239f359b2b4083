import { readFileSync } from "node:fs";
import { afterAll, describe, expect, it } from "vitest";
import { closePictureReader } from "../../../app/services/picture.server.ts";
import { type PictureScore, scorePicture, totals, truthsIn } from "../../../scripts/screens/score.ts";

/**
 * The accuracy over the fixtures against the last accepted table. The whole table with nothing given is
 * `npm run accuracy -- screens`; here every third picture is read with its text, all with their axes given.
 */
const FIXTURES = new URL("../../fixtures/screens/", import.meta.url).pathname;
const ACCEPTED = JSON.parse(readFileSync(`${FIXTURES}accepted.json`, "utf8"));
const EVERY = 3;
/** Libraries that decode and read text differ a little between machines: one picture of the set may. */
const slack = (count: number) => 1.01 / count;

afterAll(closePictureReader);

async function scores(every: number, given: boolean): Promise<PictureScore[]> {
  const folder = `${FIXTURES}pictures`;
  const all: PictureScore[] = [];
  for (const [i, truth] of truthsIn(folder).entries())
    if (i % every === 0) all.push(await scorePicture(folder, truth, given));
  return all;
}

function expectNoWorse(now: Record<string, number>, accepted: Record<string, number>, count: number): void {
  for (const [name, share] of Object.entries(accepted)) {
    expect(now[name], `${name}: the accepted share is ${share}`).toBeGreaterThanOrEqual(share - slack(count));
  }
}

describe("accuracy of reading pictures", () => {
  it("is no worse than accepted with nothing given", { timeout: 120_000 }, async () => {
    const found = await scores(EVERY, false);
    expectNoWorse(totals(found), ACCEPTED.everyThird, found.length);
  });

  it("is no worse than accepted with the axes given", { timeout: 120_000 }, async () => {
    const found = await scores(1, true);
    expectNoWorse(totals(found), ACCEPTED.given, found.length);
  });
});
