import { beforeEach, describe, expect, it } from "vitest";
import type { Visibility } from "~/auth/permissions";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { findTrailStops, findTrailStopsOf } from "~/db/steps.server";
import { type Antenna, type ElementKind, NO_ANTENNA } from "~/measurement/antenna";
import { SPEED_OF_LIGHT } from "~/measurement/feedline";
import { changeAntenna } from "~/services/antennas.server";
import { targetsOf } from "~/services/bands.server";
import { bandsOf, chooseSweeps, differencesFrom, rowsOf } from "~/services/compare.server";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { expectedAfter } from "~/services/step-expectations.server";

interface Project {
  id: number;
  publicId: string;
}

let owner: number;
let other: number;

beforeEach(async () => {
  [owner, other] = [await person("owner"), await person("other")];
});

async function person(word: string): Promise<number> {
  const userName = `${word}-${newPublicId()}`;
  return people.insert({ userName, name: word, email: `${userName}@example.com` });
}

function make(visibility: Visibility, by = owner): Promise<Project> {
  return createProject({ title: `Invented ${newPublicId()}`, summary: "", visibility, ituRegion: 1 }, by);
}

/** A series resonator of R Ω against 50 Ω, Q 20, as return loss over 5 to 9 MHz; invented. */
function file(resonanceMhz: number, ohm = 50, to = 9): Uint8Array {
  const lines = ["Frequency (MHz),Return loss (dB)"];
  for (let i = 0; i <= 800; i++) {
    const mhz = 5 + ((to - 5) * i) / 800;
    const x = ohm * 20 * (mhz / resonanceMhz - resonanceMhz / mhz);
    const gamma = Math.hypot(ohm - 50, x) / Math.hypot(ohm + 50, x);
    lines.push(`${mhz.toFixed(6)},${(-20 * Math.log10(Math.max(gamma, 1e-3))).toFixed(5)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function take(project: Project, title: string, day: number, bytes: Uint8Array): Promise<string> {
  const takenAt = new Date(Date.UTC(2026, 4, day, 10));
  const input = { project, by: { id: owner }, file: { name: `${title}.csv`, bytes }, title, takenAt };
  const taken = await takeIn({ ...input, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${title}: ${taken.kind}`);
  return taken.sweepPublicId;
}

describe("chooseSweeps", () => {
  it("answers what each person may read, and does not tell hidden from absent", async () => {
    const [hidden, linked, open] = [await make("private"), await make("linked"), await make("public")];
    const ids = [
      await take(hidden, "hidden", 1, file(7.1)),
      await take(linked, "linked", 2, file(7.2)),
      await take(open, "open", 3, file(7.3)),
    ];
    const asked = [ids[2], ids[0], "nothing123", ids[1]];
    const titles = async (userId: number | null) => {
      const { compared, missing } = await chooseSweeps(asked, userId);
      return [compared.map(({ sweep }) => sweep.title), missing];
    };
    expect(await titles(owner)).toEqual([["open", "hidden", "linked"], ["nothing123"]]);
    for (const stranger of [other, null]) {
      expect(await titles(stranger)).toEqual([
        ["open", "linked"],
        [ids[0], "nothing123"],
      ]);
    }
    await projects.insertMember(hidden.id, other, "reader");
    expect((await titles(other))[0]).toEqual(["open", "hidden", "linked"]);
  });

  it("has nothing for nothing", async () => {
    expect(await chooseSweeps([], owner)).toEqual({ compared: [], unread: [], missing: [] });
  });
});

describe("a comparison", () => {
  it("puts one dip of two projects in a row, with the way from the reference", async () => {
    const [one, two] = [await make("private"), await make("private")];
    const ids = [await take(one, "a", 1, file(7.1)), await take(two, "b", 2, file(7.2))];
    const { compared } = await chooseSweeps(ids, owner);
    const [row, ...rest] = rowsOf(compared, 0);
    expect(rest).toEqual([]);
    expect(row.cells[0].movement).toBeNull();
    const { movement } = row.cells[1];
    expect(movement?.kind).toBe("moved");
    // Both resonators are known exactly: 7.1 and 7.2 MHz.
    expect(movement?.byHz).toBeCloseTo(100e3, -3);
    const [backwards] = rowsOf(compared, 1);
    expect(backwards.cells[0].movement?.byHz).toBeCloseTo(-100e3, -3);
  });

  it("says that a sweep does not reach a dip, and that one shows none", async () => {
    const project = await make("private");
    const ids = [await take(project, "a", 1, file(7.6)), await take(project, "short", 2, file(5.6, 50, 6.4))];
    const rows = rowsOf((await chooseSweeps(ids, owner)).compared, 0);
    expect(rows.map(({ cells }) => cells.map(({ dip, movement }) => (dip ? "dip" : movement?.kind)))).toEqual(
      [
        [undefined, "dip"],
        ["dip", "unseen"],
      ],
    );
    expect(rows[0].cells[1].movement?.kind).toBe("appeared");
  });

  it("takes the difference over what both cover, from the closed form of each", async () => {
    const project = await make("private");
    const ids = [await take(project, "a", 1, file(7.1, 40)), await take(project, "b", 2, file(7.1, 80, 8))];
    const [none, difference] = differencesFrom((await chooseSweeps(ids, owner)).compared, 0);
    expect(none).toBeNull();
    const hz = difference?.frequencyHz ?? new Float64Array();
    expect([hz[0], hz[hz.length - 1]]).toEqual([5e6, 8e6]);
    const loss = (mhz: number, ohm: number) => {
      const x = ohm * 20 * (mhz / 7.1 - 7.1 / mhz);
      return -20 * Math.log10(Math.hypot(ohm - 50, x) / Math.hypot(ohm + 50, x));
    };
    for (const i of [100, 300, 700]) {
      expect(difference?.db[i]).toBeCloseTo(loss(hz[i] / 1e6, 80) - loss(hz[i] / 1e6, 40), 2);
    }
  });

  it("gives each sweep's figures of each band, design bands first and said once", async () => {
    const project = await make("private");
    const ids = [await take(project, "a", 1, file(7.1)), await take(project, "b", 2, file(6))];
    const design = [
      { name: "ours", lowHz: 7.05e6, highHz: 7.15e6, swrLimit: 1.5 },
      { name: "forty", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 },
    ];
    const bands = bandsOf((await chooseSweeps(ids, owner)).compared, 1, design as never, 3);
    expect(bands.map(({ name, design, limitSwr }) => [name, design, limitSwr])).toEqual([
      ["ours", true, 1.5],
      ["forty", true, 2],
      ["60 m", false, 3],
    ]);
    const [near, far] = bands[1].figures;
    // SWR of R = 50 Ω at 7 MHz: x = 20·|7/7.1 − 7.1/7|; SWR from abs Γ = x/hypot(2, x).
    const x = 20 * Math.abs(7 / 7.1 - 7.1 / 7);
    const gamma = x / Math.hypot(2, x);
    expect(near.swrLow).toBeCloseTo((1 + gamma) / (1 - gamma), 2);
    expect(near.bestHz).toBeCloseTo(7.1e6, -4);
    expect(far.shareUnder).toBe(0);
  });
});

describe("targetsOf", () => {
  /** Where a quarter-wave pole of this length has its dip: k = 0.951 (elements.ts names the handbook). */
  const dipOf = (lengthM: number) => (0.951 * SPEED_OF_LIGHT) / (4 * lengthM) / 1e6;
  const DESIGN = [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 }] as never;

  function antenna(lengthM: number, kind: ElementKind = "vertical"): Antenna {
    const rest = { heightM: 0, diameterMm: null, material: "", insulated: null, where: "" };
    return {
      ...NO_ANTENNA,
      elements: [{ key: "pole", kind, name: "Reed pole", lengthM, count: 1, ...rest }],
    };
  }

  function describeAs(project: Project, day: number, was: Antenna, wanted: Antenna) {
    const validFrom = new Date(Date.UTC(2026, 4, day));
    return changeAntenna({ projectId: project.id, by: owner, was, wanted, validFrom, remark: "" });
  }

  async function targets(project: Project, ...ids: string[]) {
    const { compared } = await chooseSweeps(ids, owner);
    expect(compared.every(({ sweep }) => sweep.projectId === project.id)).toBe(true);
    const last = compared[compared.length - 1];
    return targetsOf(last.sweep, last.dips, DESIGN, "metres");
  }

  it("says what to make of the part's length: in proportion after one sweep, by the line after two", async () => {
    const project = await make("private");
    await describeAs(project, 1, NO_ANTENNA, antenna(10.6));
    const first = await take(project, "long", 2, file(dipOf(10.6)));
    const [one] = await targets(project, first);
    expect(one).toMatchObject({ part: "Reed pole", without: null, inside: false });
    expect(one.trim?.method).toBe("proportion");
    // The dip at length L lies at dipOf(L): 7.1 MHz where L = 10.6·dipOf(10.6)/7.1.
    expect(one.trim?.lengthM).toBeCloseTo((10.6 * dipOf(10.6)) / 7.1, 2);
    expect(one.offsetHz).toBeCloseTo((dipOf(10.6) - 7.1) * 1e6, -3);
    await describeAs(project, 3, antenna(10.6), antenna(10.3));
    const second = await take(project, "shorter", 4, file(dipOf(10.3)));
    const [two] = await targets(project, first, second);
    expect(two.trim?.method).toBe("line");
    expect(two.trim?.lengthM).toBeCloseTo((10.6 * dipOf(10.6)) / 7.1, 2);
    const newest = (await chooseSweeps([second], owner)).compared[0].sweep.id;
    const all = await findTrailStops(project.id);
    const shared = all.filter(({ trail }) =>
      all.some((stop) => stop.trail === trail && stop.sweepId === newest),
    );
    expect(shared.length).toBeGreaterThan(1);
    expect(await findTrailStopsOf(newest)).toEqual(
      shared.map(({ numbers: { frequencyHz, frequencyUncertaintyHz, edge }, ...stop }) => ({
        ...stop,
        numbers: { frequencyHz, frequencyUncertaintyHz, edge },
      })),
    );
  });

  it("says why there is no length", async () => {
    const project = await make("private");
    const early = await take(project, "early", 1, file(7.4));
    expect((await targets(project, early))[0]).toMatchObject({ trim: null, without: "not-described" });
    await describeAs(project, 2, NO_ANTENNA, antenna(3.3));
    const late = await take(project, "late", 3, file(7.4, 60));
    expect((await targets(project, late))[0]).toMatchObject({ trim: null, without: "no-part" });
  });

  it("lets a planned step know that radials lead their dip less than poles do", async () => {
    const widths = [];
    for (const kind of ["vertical", "radial"] as const) {
      const project = await make("private");
      await describeAs(project, 1, NO_ANTENNA, antenna(10, kind));
      await take(project, "as it is", 2, file(dipOf(10)));
      const target = { part: "pole", field: "lengthM" as const };
      const quantities = [{ label: "length", unit: "m", from: null, to: 9, target }];
      const [place] = await expectedAfter(project.id, quantities, "metres");
      widths.push([place.lowHz, place.highHz].map((hz) => (hz ?? Number.NaN) / (dipOf(10) * 1e6)));
    }
    const [pole, radial] = widths;
    // A radial follows with an exponent down to 0.27 or less (tests/fixtures/nec/trims.json): (10/9)^0.27 = 1.029.
    expect(radial[0]).toBeLessThan(1.03);
    expect(pole[0]).toBeGreaterThan(1.05);
  });
});
