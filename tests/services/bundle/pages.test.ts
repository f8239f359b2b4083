import { expect, it } from "vitest";
import { indexPage } from "../../../app/services/bundle/pages.ts";
import { threadMarkdown } from "../../../app/services/bundle/threads.ts";

const numbers = {
  frequencyHz: 7_100_000,
  frequencyUncertaintyHz: 2_000,
  minimumSwr: 1.21,
  minimumSwrLow: 1.12,
  minimumSwrHigh: 1.31,
  returnLossDb: 20.4,
  bandwidth: null,
};
const sweep = { id: "swp", title: "Reeds <1>", takenAt: "2026-09-14T17:20:00.000Z", purpose: "antenna" };
const dip = { id: "dip", sweep: "swp", present: true, verdict: "open", verdictText: "", numbers };

function indexOf(dips: object[]): string {
  return indexPage({
    project: { title: "Reed bank", summary: "", demo: 1 },
    people: [],
    records: new Map<string, Record<string, unknown>[]>([
      ["sweeps", [sweep]],
      ["dips", dips as Record<string, unknown>[]],
    ]),
    threads: [],
    figures: new Set(),
    madeAt: "2026-12-01T13:02:00.000Z",
    origin: "https://swale.example",
  });
}

it("gives each dip with the digits and limits that it has", () => {
  const page = indexOf([dip]);
  expect(page).toMatch(/7\.100.MHz<\/td><td>1\.21 \(1\.12–1\.31\)<\/td>/);
  expect(page).toContain("taken 14 Sep 2026");
  expect(page).toContain("made 1 Dec 2026, 13:02 UTC");
});

it("says ∞ for an SWR beyond every number, and no limits where none are known", () => {
  const stored = { minimumSwr: null, minimumSwrLow: 40, minimumSwrHigh: null };
  expect(indexOf([{ ...dip, numbers: { ...numbers, ...stored } }])).toContain("<td>∞ (40–∞)</td>");
  const unknown = { minimumSwrLow: null, minimumSwrHigh: null };
  expect(indexOf([{ ...dip, numbers: { ...numbers, ...unknown } }])).toContain("<td>1.21</td>");
});

it("writes the day of a note as every page does", () => {
  const note = { id: "n", parent: null, author: "Ada Marsh", edited: true, removed: false, body: "Dry." };
  const at = new Date("2026-12-01T03:02:00Z");
  expect(threadMarkdown("the dip", [{ ...note, at }])).toContain(
    "**Ada Marsh**, 1 Dec 2026, 03:02 UTC, edited",
  );
});
