import { execFileSync } from "node:child_process";
import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import type { DipOrder } from "~/db/dip-table.server";
import * as dipRows from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { dips, files, sweeps } from "~/db/schema/index";
import { analyse } from "~/measurement/analyse";
import type { Dip } from "~/measurement/sweep";
import { type DipsAsked, dipsBehind, dipsCsv, dipsPage } from "~/services/dips-table/table.server";
import { createProject } from "~/services/projects.server";

const ALL: DipsAsked = {
  fromHz: null,
  toHz: null,
  swrUnder: null,
  verdict: null,
  sweep: null,
  words: [],
  band: "",
};
const BY_FREQUENCY: DipOrder = { key: "frequency", direction: "ascending" };
const SWEEPS = 500;
const DIPS = 10;
let project: { id: number; publicId: string; ituRegion: number | null };

/** A dip as the method makes it, moved to where the row wants it. */
function oneDip(): Dip {
  const frequencyHz = Float64Array.from({ length: 201 }, (_, i) => 6e6 + i * 1e4);
  const magnitude = frequencyHz.map((hz) => Math.abs(0.96 - 0.8 / (1 + (30 * (hz / 7e6 - 7e6 / hz)) ** 2)));
  return analyse({ frequencyHz, magnitude, referenceOhm: 50, plane: "instrument" }).dips[0];
}

/** 500 sweeps with ten dips each at 3 + 0.01·sweep + 5·dip MHz and SWR 1.1 + 0.2·dip: all invented. */
beforeAll(async () => {
  const by = await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null });
  const made = await createProject({ title: "Table", summary: "", visibility: "private", ituRegion: 1 }, by);
  project = { ...made, ituRegion: 1 };
  await projects.replaceDesignBands(project.id, [{ name: "mine", lowHz: 8e6, highHz: 9e6, swrLimit: 2 }], db);
  const createdAt = new Date("2026-06-01T00:00:00Z");
  const names = Array.from({ length: SWEEPS }, (_, i) => ({ i, publicId: newPublicId() }));
  await db.insert(files).values(
    names.map(({ i, publicId }) => ({
      publicId,
      projectId: project.id,
      name: `${i}.csv`,
      sizeBytes: 1,
      sha256: String(i).padStart(64, "0"),
      storageKey: `none/${publicId}`,
      createdAt,
    })),
  );
  const stored = await db
    .select({ id: files.id, name: files.name })
    .from(files)
    .where(sql`project_id = ${project.id}`);
  const fileOf = new Map(stored.map(({ id, name }) => [name, id]));
  await db.insert(sweeps).values(
    names.map(({ i, publicId }) => ({
      publicId,
      projectId: project.id,
      fileId: fileOf.get(`${i}.csv`) as number,
      title: i === 7 ? "=reed, seven" : `Sweep ${i}`,
      takenAt: i % 2 ? new Date(createdAt.getTime() + i * 60_000) : null,
      createdAt,
      analysisId: 1,
    })),
  );
  const ids = new Map(
    (
      await db
        .select({ id: sweeps.id, publicId: sweeps.publicId })
        .from(sweeps)
        .where(sql`project_id = ${project.id}`)
    ).map(({ id, publicId }) => [publicId, id]),
  );
  const base = oneDip();
  for (let from = 0; from < SWEEPS; from += 50) {
    await dipRows.insertAll(
      names.slice(from, from + 50).flatMap(({ i, publicId }) =>
        Array.from({ length: DIPS }, (_, d) => ({
          projectId: project.id,
          sweepId: ids.get(publicId) as number,
          publicId: newPublicId(),
          numbers: { ...base, frequencyHz: (3 + 0.01 * i + 5 * d) * 1e6, minimumSwr: 1.1 + 0.2 * d },
        })),
      ),
      db,
    );
  }
  await db.execute(sql`analyze table dips, sweeps, trail_dips, trails, notes`);
});

describe("dipsPage", () => {
  it("has 100 rows a page, every dip once, and says how many there are", async () => {
    const first = await dipsPage(project, ALL, BY_FREQUENCY, 1);
    expect([first.all, first.rows.length, first.more]).toEqual([5000, 100, true]);
    const last = await dipsPage(project, ALL, BY_FREQUENCY, 50);
    expect([last.rows.length, last.more]).toEqual([100, false]);
    expect(first.rows[0].numbers.frequencyHz).toBe(3e6);
    expect(last.rows[99].numbers.frequencyHz).toBe(52.99e6);
  });

  it("goes on behind a place, and ends", async () => {
    const asked = { ...ALL, swrUnder: 1.2 };
    const seen: number[] = [];
    let place: Awaited<ReturnType<typeof dipsBehind>>["next"] = null;
    do {
      const page = await dipsBehind(project, asked, BY_FREQUENCY, place);
      expect(page.all).toBe(500);
      seen.push(...page.rows.map(({ numbers }) => numbers.frequencyHz));
      place = page.next;
    } while (place);
    // The first dip of each sweep: 3 + 0.01·i MHz.
    expect(seen.map((hz) => Math.round(hz / 1e4))).toEqual(Array.from({ length: SWEEPS }, (_, i) => 300 + i));
  });

  it.each<[string, Partial<DipsAsked>, number]>([
    // 8 to 9 MHz: the second dip (8 + 0.01·i) of sweeps 0 to 100.
    ["a range", { fromHz: 8e6, toHz: 9e6 }, 101],
    ["the design band, which is that range", { band: "design" }, 101],
    ["outside the design bands", { band: "not-design" }, 4899],
    // 1.1, 1.3 and 1.5 are under 1.6.
    ["SWR", { swrUnder: 1.6 }, 1500],
    ["words of a title", { words: ["reed"] }, 10],
    ["a verdict", { verdict: "settled" }, 0],
    // 14 to 14.35 MHz: 13 + 0.01·i from 14.00 to 14.35.
    ["a band by its name", { band: "in:20 m" }, 36],
  ])("filters by %s", async (_, asked, n) => {
    expect((await dipsPage(project, { ...ALL, ...asked }, BY_FREQUENCY, 1)).all).toBe(n);
  });

  it("takes a sweep's dips by its address, and none of another project", async () => {
    const [row] = (await dipsPage(project, { ...ALL, words: ["reed"] }, BY_FREQUENCY, 1)).rows;
    const own = await dipsPage(project, { ...ALL, sweep: row.sweepPublicId }, BY_FREQUENCY, 1);
    expect(own.all).toBe(10);
    const elsewhere = { ...project, id: project.id + 1_000_000 };
    expect((await dipsPage(elsewhere, { ...ALL, sweep: row.sweepPublicId }, BY_FREQUENCY, 1)).all).toBe(0);
  });

  it.each(["sweep", "taken", "swr", "return-loss", "width", "q", "verdict"] as const)(
    "orders by %s both ways",
    async (key) => {
      for (const direction of ["ascending", "descending"] as const) {
        const { rows } = await dipsPage(project, ALL, { key, direction }, 1);
        expect(rows).toHaveLength(100);
        if (key === "swr")
          expect(rows[0].numbers.minimumSwr).toBeCloseTo(direction === "ascending" ? 1.1 : 2.9);
        if (key === "taken" && direction === "descending") expect(rows[0].sweepTitle).toBe("Sweep 499");
      }
    },
  );

  it("finds a range by the index over project and frequency, without sorting", async () => {
    const [plan] = (await db.execute(sql`explain select d.id from ${dips} d where d.project_id = ${project.id}
      and d.present = true and d.frequency_hz between 8e6 and 9e6 order by d.frequency_hz, d.id limit 101`)) as unknown as [
      { key: string; rows: number | string; Extra: string }[],
    ];
    expect(plan[0].key).toBe("dips_project_frequency");
    expect(Number(plan[0].rows)).toBeLessThan(500);
    expect(plan[0].Extra).not.toContain("filesort");
  });
});

it("writes every row into the CSV, and another reader finds the numbers again", async () => {
  let text = "";
  for await (const piece of dipsCsv(project, { ...ALL, words: [] }, BY_FREQUENCY)) text += piece;
  const script =
    "import csv,io,json,sys;r=list(csv.DictReader(io.StringIO(sys.stdin.buffer.read().decode(),newline='')));print(json.dumps({'n':len(r),'sum':sum(float(x['frequency_hz']) for x in r),'seven':[x for x in r if 'reed' in x['sweep_title']][0]}))";
  const read = JSON.parse(
    execFileSync("/usr/bin/python3", ["-c", script], { input: text, maxBuffer: 1e8 }).toString(),
  );
  expect(read.n).toBe(5000);
  // 500·10·3 + 0.01·10·(0+…+499) + 5·500·(0+…+9) MHz.
  expect(read.sum).toBeCloseTo((15_000 + 0.1 * 124_750 + 2500 * 45) * 1e6, 0);
  expect(read.seven).toMatchObject({
    sweep_title: "'=reed, seven",
    frequency_hz: "3070000",
    swr: "1.1",
    swr_low: "",
    band: "outside",
    in_design_band: "no",
    verdict: "open",
  });
});
