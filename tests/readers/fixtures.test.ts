import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { answer, read, reusable } from "../../app/readers/read.ts";
import type { ReadResult } from "../../app/readers/reading.ts";
import { HF, magnitude, points } from "./make-fixtures/model.ts";
import { FIXTURES, FOLDER, TEXT_FIXTURES } from "./make-fixtures/write.ts";

/** Largest error that a fixture's printed digits leave in abs Γ; SWR and levels with three decimals are the coarsest. */
const PRINTED = 2e-3;

const file = (name: string) => ({ name, bytes: new Uint8Array(readFileSync(FOLDER + name)) });
const truthOf = (name: string) => JSON.parse(readFileSync(`${FOLDER}${name}.json`, "utf8"));
const names = readdirSync(FOLDER)
  .filter((name) => name.endsWith(".json"))
  .map((name) => name.replace(/\.json$/, ""));

function readSweep(name: string): Extract<ReadResult, { ok: true }> {
  const { zero_db_at: zeroDb } = truthOf(name);
  const result = read(file(name), zeroDb === undefined ? {} : { text: { zeroDb } });
  if (!result.ok) throw new Error(`${name}: ${result.problem.message}`);
  return result;
}

describe("fixtures", () => {
  it("are at least forty of text and fifteen of Touchstone, each a trouble of its own", () => {
    expect(TEXT_FIXTURES.length).toBeGreaterThanOrEqual(40);
    expect(FIXTURES.length - TEXT_FIXTURES.length).toBeGreaterThanOrEqual(15);
    expect(new Set(FIXTURES.map((f) => f.trouble)).size).toBe(FIXTURES.length);
  });

  it.each(FIXTURES)("$file is what the script makes", ({ file: name, bytes, truth }) => {
    expect(Buffer.compare(readFileSync(FOLDER + name), bytes)).toBe(0);
    expect(truthOf(name).file).toBe(truth.file);
  });

  it.each(names)("%s: points, ends and reference as the truth says", (name) => {
    const truth = truthOf(name);
    const { sweep } = readSweep(name);
    expect(sweep.frequencyHz).toHaveLength(truth.points);
    expect(sweep.frequencyHz[0]).toBeCloseTo(truth.start_mhz * 1e6, 0);
    expect(sweep.frequencyHz[truth.points - 1]).toBeCloseTo(truth.stop_mhz * 1e6, 0);
    expect(sweep.referenceOhm).toBe(truth.reference_ohm ?? 50);
    for (let i = 1; i < truth.points; i++)
      expect(sweep.frequencyHz[i]).toBeGreaterThan(sweep.frequencyHz[i - 1]);
  });

  it.each(FIXTURES)("$file: every value as the antenna model says ($trouble)", ({ file: name, truth }) => {
    const { sweep, reading } = readSweep(name);
    expect(reading.quantity).toBe(truth.quantity);
    const model = { ...HF, ...modelOf(name) };
    const wanted = new Map(points(model).map((p) => [Math.round(p.mhz * 1e6), p]));
    for (const [i, hz] of sweep.frequencyHz.entries()) {
      const point = wanted.get(Math.round(hz));
      if (!point) throw new Error(`${name}: no point of the model at ${hz} Hz`);
      if (Number.isNaN(sweep.magnitude[i]) || sweep.magnitude[i] === 1) continue;
      if (name === "infinite-swr.csv" && i < 6) continue;
      expect(Math.abs(sweep.magnitude[i] - magnitude(point))).toBeLessThan(PRINTED);
      if (!sweep.gammaRe || !sweep.gammaIm) continue;
      expect(Math.abs(sweep.gammaRe[i] - point.re)).toBeLessThan(PRINTED);
      expect(Math.abs(sweep.gammaIm[i] - point.im)).toBeLessThan(PRINTED);
    }
  });

  it.each(names)("%s: giving the whole reading back reads the same sweep", (name) => {
    const first = readSweep(name);
    const again = read(file(name), first.reading.spec);
    if (!again.ok) throw new Error(again.problem.message);
    expect(again.sweep).toEqual(first.sweep);
    expect(again.reading.spec).toEqual(first.reading.spec);
    expect(again.reading.shape).toBe(first.reading.shape);
  });

  it.each(names)("%s: the choices that may be used again read the same sweep", (name) => {
    const first = readSweep(name);
    const again = read(file(name), reusable(first.reading));
    if (!again.ok) throw new Error(again.problem.message);
    expect(again.sweep).toEqual(first.sweep);
  });

  it.each(names)("%s: answering every question with what was proposed changes nothing", (name) => {
    const first = readSweep(name);
    for (const question of first.reading.questions) {
      expect(question.choices.map((c) => c.value)).toContain(
        question.id === "zero-db" ? question.choices[0].value : question.proposed,
      );
      const again = read(file(name), answer(first.reading, question.id, question.proposed ?? ""));
      if (!again.ok) throw new Error(again.problem.message);
      expect(again.sweep).toEqual(first.sweep);
    }
  });

  it.each(names)("%s: every answer to every question ends in a sweep or a problem", (name) => {
    const first = readSweep(name);
    for (const question of first.reading.questions)
      for (const choice of question.choices) {
        const other = read(file(name), answer(first.reading, question.id, choice.value));
        expect(other.ok || other.problem.message.length > 10).toBe(true);
      }
  });
});

function modelOf(name: string) {
  const fixture = FIXTURES.find((f) => f.file === name);
  return fixture?.model;
}
