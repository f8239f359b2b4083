import { describe, expect, it } from "vitest";
import { fitted, framed } from "~/services/plates/oembed.server";
import { differencesOf } from "../../../app/services/plates/differences.ts";
import { embedPage } from "../../../app/services/plates/embed.ts";
import { figureOf } from "../../../app/services/plates/figure.ts";
import { parseRecord } from "../../../app/services/plates/record.ts";
import { tablesCsv } from "../../../app/services/plates/table-csv.ts";
import { tablesOf } from "../../../app/services/plates/tables.ts";
import { choicesOf, materialOf, materialSweep, recordOf, sweepOf } from "./sample.ts";

const one = materialSweep("sweepaaaaa", "One", sweepOf([{ hz: 7.1e6, ohm: 100, q: 12 }]));
const record = recordOf(materialOf([one]));

describe("a plate's figure and tables", () => {
  it("say the closed form: 100 Ω against 50 Ω are an SWR of 2, less what the shunt adds", () => {
    const [row] = record.tables[0].rows;
    expect(row.frequency).toBeCloseTo(7.1, 1);
    // 100 Ω beside 5000 Ω are 98.04 Ω: an SWR of 1.961.
    expect(row.swr).toBeCloseTo(1.96, 1);
    expect([row.swrLow, row.swrHigh]).toEqual([null, null]);
  });

  it("come back from JSON as they were, to the last digit", () => {
    expect(parseRecord(JSON.stringify(record))).toEqual(record);
    expect(figureOf(materialOf([one]))).toEqual(record.figure);
  });

  it("keep to the chosen stretch, and to the whole where that is none", () => {
    const of = (fromHz: number | null, toHz: number | null) =>
      figureOf(materialOf([one], { choices: choicesOf({ fromHz, toHz }) })).frequency;
    expect(of(5e6, 9e6)).toMatchObject({ fromHz: 5e6, toHz: 9e6 });
    expect(of(9e6, 5e6)).toMatchObject({ fromHz: 1e6, toHz: 30e6 });
    expect(figureOf(materialOf([one], { choices: choicesOf({ fromHz: 20e6 }) })).dips).toEqual([]);
  });

  it("write what is unknown as nothing, and no formula", () => {
    const named = { ...record.tables[0], rows: [{ ...record.tables[0].rows[0], verdict: "=1+1" }] };
    const [head, cells] = tablesCsv({ tables: [named] }).split("\r\n");
    expect(head.split(",").length).toBe(cells.split(",").length);
    expect(cells).toContain(",'=1+1");
    expect(cells.split(",")[3]).toBe("");
  });
});

describe("differencesOf", () => {
  const same = () => structuredClone({ figure: record.figure, tables: record.tables });

  it("finds none between the same", () => {
    expect(differencesOf(record, same(), "3")).toEqual([]);
  });

  it("names each number that differs, by how much, and a line once", () => {
    const now = same();
    now.figure.dips[0].q = (now.figure.dips[0].q ?? 0) + 0.5;
    now.figure.traces[0].value[7] = 0.25;
    const found = differencesOf(record, now, "3");
    expect(found.map(({ what }) => what)).toEqual([
      expect.stringMatching(/^the dip at 7\.1\d* MHz: loaded Q$/),
      "the line “One”: its values",
    ]);
    expect(found[0].why).toMatch(/^\+0\.5\. The method bears the same version/);
    expect(found[1].why).toMatch(/^1 of 401 points differ, by [\d.]+ at most\. /);
  });

  it("says of a dip that it is gone or new, and of tables that they alone are written otherwise", () => {
    const now = same();
    now.figure.dips = [{ ...now.figure.dips[0], id: "new-1" }];
    expect(differencesOf(record, now, "4").map((one) => [one.frozen, one.now])).toEqual([
      ["found", "not found"],
      ["not found", "found"],
    ]);
    const rewritten = { figure: record.figure, tables: tablesOf("dip", record.figure) };
    expect(differencesOf(record, rewritten, "4")).toMatchObject([
      { what: "how the tables write the numbers" },
    ]);
  });
});

describe("embedding", () => {
  const size = { wide: { width: 960, height: 600 }, narrow: { width: 420, height: 500 } };

  it("leads to the plate, without a script, whatever its title is", () => {
    const html = embedPage({ ...record, title: '"><script>' }, size);
    expect(html).not.toMatch(/<script|\son\w+=|https?:\/\/(?!swale\.example)/);
    expect(html).toContain('<a href="https://swale.example/plates/abcdefghjk" target="_top">');
    expect(html).toContain("&quot;&gt;&lt;script&gt;");
  });

  it("fits the frame to what is asked for", () => {
    expect(fitted(size, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY)).toEqual({
      width: 960,
      height: 600,
    });
    expect(fitted(size, 420, 10_000)).toEqual({ width: 420, height: 500 });
    for (const most of [60, 200, 300, 400, 599])
      expect(fitted(size, 960, most).height).toBeLessThanOrEqual(most);
  });

  it("is of this site, wherever a plate that was taken in was before", () => {
    const elsewhere = { ...record, number: 1, madeBy: "Ada", address: "https://elsewhere.example/plates/x" };
    const answer = framed("k3f9w2k3f9", elsewhere, { width: 960, height: 600 }, { width: 400, height: 250 });
    expect(JSON.stringify(answer)).not.toContain("elsewhere");
    expect(answer.html).toMatch(/^<iframe src="[^"]+\/plates\/k3f9w2k3f9\/embed" width="400" height="250"/);
  });
});
