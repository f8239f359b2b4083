import { Parser } from "htmlparser2";
import { describe, expect, it } from "vitest";
import { letterOf, linesOf } from "~/services/plates/draw/lettering";
import { placeNames } from "~/services/plates/draw/trail-names";
import { drawFigure } from "~/services/plates/draw.server";
import type { PlateRecord } from "~/services/plates/record";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "../../../app/measurement/bench.ts";
import { BENCH_WISH } from "../../../app/services/plates/wish.ts";
import { choicesOf, materialOf, materialSweep, recordOf, sweepOf } from "./sample.ts";

const two = [
  { hz: 7.1e6, ohm: 45, q: 12 },
  { hz: 18.3e6, ohm: 62, q: 20 },
];
const a = materialSweep("sweepaaaaa", "Before <the> trim & after", sweepOf(two));
const b = materialSweep(
  "sweepbbbbb",
  "After",
  sweepOf(two.map(({ hz, ...rest }) => ({ hz: hz * 1.02, ...rest }))),
);
const trails = [
  {
    id: "t",
    label: "the “deep” one",
    tone: "clay" as const,
    stops: [a, b].map(({ id, dips }) => ({ trace: id, dip: dips[0].id })),
  },
];
const level = (value: number) => {
  const sweep = sweepOf([]);
  return { ...sweep, magnitude: sweep.magnitude.map(() => value), gammaRe: undefined, gammaIm: undefined };
};
const references = { open: level(1), short: level(0.98), load: level(0.01) };

const records: Record<string, PlateRecord> = {
  sweep: recordOf(materialOf([a])),
  "swr, log": recordOf(materialOf([a], { choices: choicesOf({ quantity: "swr", scale: "log" }) })),
  dip: recordOf(materialOf([a], { kind: "dip", focus: a.dips[1].id })),
  bare: recordOf(
    materialOf([a], { choices: choicesOf({ showBands: false, showDips: false, showTitle: false }) }),
  ),
  compare: recordOf(materialOf([a, b], { kind: "compare", trails })),
  trail: recordOf(materialOf([a, b], { kind: "trail", trails })),
  strip: recordOf(
    materialOf([a, b], {
      kind: "strip",
      trails,
      steps: [{ id: "s", label: "Cut <12> cm", caption: "2 Sep 2026", before: b.id }],
    }),
  ),
  bench: recordOf(
    materialOf([], {
      kind: "bench",
      bench: {
        correction: { references, standards: IDEAL_STANDARDS, given: NOTHING_GIVEN },
        wish: BENCH_WISH,
      },
    }),
  ),
};

describe("drawFigure", () => {
  for (const [name, record] of Object.entries(records)) {
    it(`draws a ${name} of SVG alone, well formed, its words as text`, () => {
      for (const theme of ["light", "dark"] as const) {
        for (const width of [960, 420]) {
          const svg = drawFigure(record, { theme, width });
          const { names, text, attributes } = parsed(svg);
          expect([...names].filter((one) => !ELEMENTS.has(one))).toEqual([]);
          expect(attributes.filter((one) => /^on|href|^style$|^class$/.test(one))).toEqual([]);
          expect(svg).not.toMatch(/NaN|Infinity|undefined|url\(/);
          expect(text).toContain("Ada Marsh");
          expect(text.includes("PLATE 3")).toBe(name !== "bare");
          expect(svg).toMatch(
            new RegExp(`^<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="\\d+"`),
          );
        }
      }
    });
  }

  it("names what each letter stands for, with limits or that they are unknown", () => {
    const { text } = parsed(drawFigure(records.sweep, { theme: "light" }));
    expect(text).toMatch(/7\.1\d+\u2009MHz, SWR 1\.1\d \(limits unknown\), \d+\u2009kHz under SWR 2/);
    expect(parsed(drawFigure(records.strip, { theme: "light" })).text).toContain("Cut <12> cm, 2 Sep 2026");
  });

  it("is the same again from the record alone", () => {
    const again = JSON.parse(JSON.stringify(records.compare)) as PlateRecord;
    expect(drawFigure(again, { theme: "dark" })).toBe(drawFigure(records.compare, { theme: "dark" }));
  });
});

describe("lettering", () => {
  it("keeps every line inside, and breaks what is longer than one", () => {
    const lines = linesOf(`short words and ${"x".repeat(90)} more`, 200, 14);
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(25);
    expect(lines.join("").replaceAll(" ", "")).toBe(`shortwordsand${"x".repeat(90)}more`);
    expect(linesOf("a b c ".repeat(200), 100, 14, 2)).toHaveLength(2);
    expect(linesOf("", 100, 14)).toEqual([]);
  });

  it("counts on after z", () => {
    expect([0, 25, 26, 27, 52].map(letterOf)).toEqual(["a", "z", "aa", "ab", "ba"]);
  });
});

describe("placeNames", () => {
  it("puts no name on another, nor outside", () => {
    const trails = [100, 120, 140, 590].map((x) => ({
      id: `${x}`,
      name: "Long element",
      stops: [{ x, y: 30 }],
    }));
    const boxes = [...placeNames(trails, 600).values()].map(({ x, y, anchor }) => ({
      left: anchor === "start" ? x : x - 84,
      y,
    }));
    for (const [i, a] of boxes.entries()) {
      expect(a.left).toBeGreaterThanOrEqual(0);
      expect(a.left + 84).toBeLessThanOrEqual(600);
      for (const b of boxes.slice(i + 1))
        expect(Math.abs(a.left - b.left) >= 84 || Math.abs(a.y - b.y) >= 13).toBe(true);
    }
  });
});

/** A strict reading: every element closed by its own name, nothing but elements and text. */
function parsed(svg: string) {
  const names = new Set<string>();
  const attributes: string[] = [];
  const open: string[] = [];
  let text = "";
  const parser = new Parser(
    {
      onopentag(name, own) {
        names.add(name);
        attributes.push(...Object.keys(own));
        open.push(name);
      },
      onclosetag(name, implied) {
        expect([open.pop(), implied]).toEqual([name, false]);
      },
      ontext: (part) => {
        text += part;
      },
    },
    { xmlMode: true, recognizeSelfClosing: false },
  );
  parser.write(svg);
  expect(open).toEqual([]);
  parser.end();
  return { names, text, attributes };
}

/** Of SVG 1.1, those that no script, style or picture comes in by. */
const ELEMENTS = new Set("svg g title desc rect line path circle text tspan".split(" "));
