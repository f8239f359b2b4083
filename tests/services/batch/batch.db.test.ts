import { eq, like } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import * as batches from "~/db/batches.server";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import { files, jobs, steps as stepTable, sweeps } from "~/db/schema/index";
import { beginTaking, giveUp, leaveOutProblems, mendRows } from "~/services/batch/mend.server";
import { namedIn } from "~/services/batch/named.server";
import { problemsOf } from "~/services/batch/problems";
import { addToBatch, beginBatch, prefixOf, sealBatch } from "~/services/batch/receive.server";
import type { BatchReport } from "~/services/batch/report";
import { startOnBatch, workOn } from "~/services/batch/work.server";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { getObject } from "~/services/storage.server";
import { type Entry, sweepText, zipOf } from "./mixed.ts";

let by: { id: number };
let project: { id: number; publicId: string };
let run: string;
const bytes = (text: string) => new TextEncoder().encode(text);

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
  run = newPublicId();
  await beginBatch(run, project, by);
});

async function reportOf(): Promise<BatchReport> {
  return (await batches.findByPublicId(run))?.report as BatchReport;
}

/** Name and what stands in the way, row by row. */
async function problemTable() {
  const report = await reportOf();
  const found = problemsOf(report, await namedIn(project.id), new Date());
  return report.rows.map(
    ({ name }, i) => `${name}: ${found[i].map(({ code }) => code).join(", ") || "fine"}`,
  );
}

const sweepCount = async () =>
  (await db.select().from(sweeps).where(eq(sweeps.projectId, project.id))).length;

const good = (i: number) => ({ name: `good/${i}.csv`, text: sweepText(3 + i / 4) });

describe("a batch of sixty mixed files in a ZIP", () => {
  const upTo = (n: number) => Array.from({ length: n }, (_, i) => i);
  const CLIMBING = ["../climbs", "a/../../climbs", "/absolute", "a\\..\\back", "c:/drive", "C:drive"];
  const ENTRIES: Entry[] = [
    ...upTo(12).map((i) => good(i)),
    ...upTo(12).map((i) => ({ name: `copy/${i}.csv`, text: good(i).text })),
    ...upTo(6).map((i) => ({ name: `copied again/${i}.csv`, text: good(i).text })),
    ...[100, 101].map((i) => ({ name: `here/${i}.csv`, text: good(i).text })),
    { name: "broken/words.txt", text: "nothing but words\nand more of them\n" },
    { name: "broken/short.csv", text: "Frequency (MHz),S11 (dB)\n7.1,-12\n" },
    { name: "broken/what.bin", text: "%PDF-1.4 this is no sweep" },
    { name: "broken/empty.csv", text: "" },
    ...upTo(6).map((i) => ({
      name: `inner/${i}.${i % 2 ? "csv" : "zip"}`,
      text: sweepText(7),
      nested: true,
    })),
    ...[...CLIMBING, ...CLIMBING].map((name, i) => ({ name: `${name}${i}.csv`, text: sweepText(9 + i) })),
    ...upTo(2).map((i) => ({ name: `link${i}.csv`, text: "/etc/passwd", link: true })),
    ...upTo(2).map((i) => ({ name: `zeros${i}.csv`, zeros: 20 * 1024 * 1024 })),
    ...upTo(2).map((i) => ({ name: `GOOD/${i}.csv`, text: sweepText(29 - i) })),
  ];

  it("is told row by row what stands in the way, with nothing written; the rest is taken in", async () => {
    expect(ENTRIES).toHaveLength(60);
    for (const i of [100, 101]) {
      await takeIn({
        project,
        by,
        file: { name: `${i}.csv`, bytes: bytes(good(i).text) },
        keepUnread: false,
      });
    }
    await addToBatch(
      run,
      [{ name: "all.zip", bytes: zipOf([...ENTRIES, { name: "__MACOSX/x", text: "x" }]) }],
      null,
    );
    await sealBatch(run);
    expect(await workOn(run, 60_000)).toBe("finished");
    expect(await problemTable()).toEqual([
      ...upTo(12).map((i) => `good/${i}.csv: fine`),
      ...upTo(12).map((i) => `copy/${i}.csv: same-bytes`),
      ...upTo(6).map((i) => `copied again/${i}.csv: same-bytes`),
      ...[100, 101].map((i) => `here/${i}.csv: already-here`),
      "broken/words.txt: unreadable",
      "broken/short.csv: unreadable",
      "broken/what.bin: unreadable",
      ...ENTRIES.slice(35).map(({ name }) => `${name}: refused-file`),
    ]);
    expect((await reportOf()).passedOver).toBe(1);
    expect(await sweepCount()).toBe(2);

    expect(await beginTaking(run, project.id)).toBe(false);
    await leaveOutProblems(run, project.id);
    // Pressed twice.
    expect(await Promise.all([beginTaking(run, project.id), beginTaking(run, project.id)])).toEqual([
      true,
      true,
    ]);
    await Promise.all([workOn(run, 60_000), workOn(run, 60_000)]);
    const { phase, rows } = await reportOf();
    expect(phase).toBe("done");
    expect(rows.filter(({ result }) => result?.kind === "read")).toHaveLength(12);
    expect(await sweepCount()).toBe(14);
    const { doneParts, allParts, state } = (await batches.findByPublicId(run)) ?? {};
    expect([doneParts, allParts, state]).toEqual([12, 12, "done"]);
    expect(await db.select().from(files).where(like(files.storageKey, "batches/%"))).toEqual([]);
  });
});

describe("a batch with a table", () => {
  const table = (lines: string[]) => ({
    name: "mine.csv",
    bytes: bytes(["file,title,taken at,bench,step", ...lines].join("\n")),
  });

  async function send(lines: string[], names: string[]) {
    const sent = names.map((name, i) => ({ name, bytes: bytes(sweepText(5 + i)) }));
    await addToBatch(run, sent, table(lines));
    await sealBatch(run);
    await workOn(run, 60_000);
  }

  it("gives sweeps their titles, days and steps", async () => {
    const step = {
      title: "Choke added",
      body: "",
      state: "done" as const,
      at: new Date("2026-05-01"),
      quantities: [],
    };
    await makeStep({ projectId: project.id, by: by.id }, step);
    await send(["a.csv,Wet night,2026-05-02 20:15,,choke added", "b.csv,,,,"], ["s/a.csv", "s/b.csv"]);
    expect(await problemTable()).toEqual(["a.csv: fine", "b.csv: fine"]);
    await beginTaking(run, project.id);
    await startOnBatch(run);
    const kept = await db.select().from(sweeps).where(eq(sweeps.projectId, project.id)).orderBy(sweeps.id);
    expect(kept.map(({ title, takenAt }) => [title, takenAt?.toISOString() ?? null])).toEqual([
      ["Wet night", "2026-05-02T20:15:00.000Z"],
      ["b", null],
    ]);
    const [{ after }] = await db
      .select({ after: stepTable.afterSweepId })
      .from(stepTable)
      .where(eq(stepTable.projectId, project.id));
    expect(after).toBe(kept[0].id);
  });

  it("is mended row by row, and by sending the file that was missing", async () => {
    await send(["a.csv,,30 May,No bench,", "late.csv,Late,,,", "typo.csv,Typo,,,"], ["a.csv", "right.csv"]);
    expect(await problemTable()).toEqual([
      "a.csv: bad-date, unknown-bench",
      "late.csv: missing-file",
      "typo.csv: missing-file",
      "right.csv: fine",
    ]);
    await mendRows(run, [
      { row: 0, name: "a.csv", wanted: { takenAt: "2026-05-30", bench: "" } },
      { row: 2, name: "typo.csv", file: 1 },
      // Another row by now: left alone.
      { row: 1, name: "other.csv", leftOut: true },
    ]);
    await addToBatch(run, [{ name: "late.csv", bytes: bytes(sweepText(20)) }], null);
    await sealBatch(run);
    await workOn(run, 60_000);
    expect(await problemTable()).toEqual(["a.csv: fine", "late.csv: fine", "typo.csv: fine"]);
  });

  it("is the same batch when its form comes twice, and nobody else's", async () => {
    expect((await beginBatch(run, project, by))?.publicId).toBe(run);
    const other = await createProject(
      { title: "Else", summary: "", visibility: "private", ituRegion: null },
      by.id,
    );
    expect(await beginBatch(run, other, by)).toBeUndefined();
    const ends = await db.select().from(jobs).where(eq(jobs.kind, "drop-batch"));
    expect(ends.filter(({ payload }) => (payload as { run: string }).run === run)).toHaveLength(1);
  });

  it("takes nothing more once it is being taken in: nobody has looked at that", async () => {
    await send(["a.csv,First,,,"], ["a.csv"]);
    expect(await beginTaking(run, project.id)).toBe(true);
    const before = await reportOf();
    const late = { name: "late.csv", bytes: bytes(sweepText(9)) };
    expect(await addToBatch(run, [late], table(["late.csv,Late,,,"]))).toBe(false);
    await sealBatch(run);
    expect(await reportOf()).toEqual(before);
    await workOn(run, 60_000);
    expect(await addToBatch(run, [late], null)).toBe(false);
    expect(await sweepCount()).toBe(1);
  });

  it("goes on where it was broken off", async () => {
    await addToBatch(
      run,
      Array.from({ length: 6 }, (_, i) => ({ name: `${i}.csv`, bytes: bytes(sweepText(4 + i)) })),
      null,
    );
    await sealBatch(run);
    // No time at all: some is left each time.
    expect(await workOn(run, 0)).toBe("more");
    expect(await workOn(run, 60_000)).toBe("finished");
    await beginTaking(run, project.id);
    expect(await workOn(run, 60)).toMatch(/more|finished/);
    await workOn(run, 60_000);
    expect((await reportOf()).rows.map(({ result }) => result?.kind)).toEqual(Array(6).fill("read"));
    expect(await sweepCount()).toBe(6);
  });

  it("leaves nothing behind when it is given up", async () => {
    await send([], ["a.csv"]);
    const key = (await reportOf()).files[0].kept?.key ?? "";
    expect(key.startsWith(prefixOf(run))).toBe(true);
    expect(await giveUp(run)).toBe(true);
    expect(await batches.findByPublicId(run)).toBeUndefined();
    await expect(getObject(key)).rejects.toThrow();
    expect(await sweepCount()).toBe(0);
  });
});
