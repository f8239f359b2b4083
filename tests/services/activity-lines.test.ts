import { describe, expect, it } from "vitest";
import { countWords, foldDays, type Happened } from "~/services/activity-lines";
import { EVENT_KINDS } from "~/services/event-kinds";

const at = (day: number, hour: number) => new Date(Date.UTC(2026, 4, day, hour));
const event = (
  kind: Happened["kind"],
  about: Happened["about"],
  when: Date,
  by: string | null = "Ada",
): Happened => ({
  kind,
  about,
  at: when,
  by,
});
const told = (happened: Happened[]) =>
  foldDays(happened, ({ sweep }) => (sweep ? `/${sweep}` : null)).map(({ day, lines }) => [
    day,
    ...lines.map(
      (line) => `${line.words} ${line.items.map(({ title }) => title).join(", ")} (${line.by.join(", ")})`,
    ),
  ]);

describe("foldDays", () => {
  it("tells what is alike on one day in one line, days and lines newest first", () => {
    const on = { sweep: "s", dip: "d", title: "7.1 MHz, First" };
    expect(
      told([
        event("note.added", on, at(3, 9), "Bram"),
        event("sweep.added", { sweep: "s2", title: "Second" }, at(2, 23)),
        event("note.added", on, at(2, 12)),
        event("note.added", on, at(2, 11), null),
        event("sweep.added", { sweep: "s", title: "First" }, at(2, 10)),
      ]),
    ).toEqual([
      ["2026-05-03", "A note on 7.1 MHz, First (Bram)"],
      ["2026-05-02", "2 sweeps came in: Second, First (Ada)", "2 notes on 7.1 MHz, First (Ada)"],
    ]);
  });

  it("names a few of many, and counts the rest", () => {
    const many = Array.from({ length: 9 }, (_, i) =>
      event("sweep.added", { sweep: `s${i}`, title: `S${i}` }, at(2, 1)),
    );
    const [{ lines }] = foldDays(many, () => null);
    expect([lines.length, lines[0].count, lines[0].items.length, lines[0].more]).toEqual([1, 9, 4, 5]);
  });

  it("tells plates that were made in one line, and each that was withdrawn by itself", () => {
    const plate = (kind: Happened["kind"], id: string) =>
      event(kind, { plate: id, sweep: "s", title: `Plate ${id}` }, at(2, 1));
    const made = [plate("plate.made", "2"), plate("plate.made", "1")];
    expect(told(made)).toEqual([["2026-05-02", "2 plates were made: Plate 2, Plate 1 (Ada)"]]);
    const gone = [plate("plate.withdrawn", "2"), plate("plate.withdrawn", "1")];
    expect(told(gone)[0]).toHaveLength(3);
  });

  it("keeps the threads of two dips apart", () => {
    const [{ lines }] = foldDays(
      ["d1", "d2"].map((dip) => event("note.added", { sweep: "s", dip, title: dip }, at(2, 1))),
      () => null,
    );
    expect(lines).toHaveLength(2);
  });

  it("is empty where nothing happened, and has words for every kind", () => {
    expect(foldDays([], () => null)).toEqual([]);
    for (const kind of EVENT_KINDS) {
      expect(countWords(kind, 2)).toMatch(/^2 /);
      expect(told([event(kind, { title: "it" }, at(1, 1))])[0][1]).toMatch(/ it \(Ada\)$/);
    }
  });
});
