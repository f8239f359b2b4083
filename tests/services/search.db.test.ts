import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import * as antennas from "~/db/antennas.server";
import { db, inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { blocks, plates } from "~/db/schema";
import * as writeUps from "~/db/write-ups.server";
import { NO_ANTENNA } from "~/measurement/antenna";
import { takeIn } from "~/services/intake.server";
import { removeNote } from "~/services/note-changes.server";
import { writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";
import { find } from "~/services/search.server";
import type { DipRange } from "~/services/search-question";
import { makeStep } from "~/services/steps.server";
import { changeDraft, makeDraft } from "~/services/write-ups/drafts.server";
import { publish, revisionOf, takeBack } from "~/services/write-ups/publish.server";

const NONE: DipRange = { fromHz: null, toHz: null, swrUnder: null, swrOver: null, verdict: null };
type Who = { id: number };
let owner: Who;
let stranger: Who;
let former: Who;
let other: Who;
const places: Record<string, { id: number; publicId: string }> = {};

async function person(name: string): Promise<Who> {
  return { id: await people.insert({ userName: `${name}-${newPublicId()}`, name, email: null }) };
}

/** S11 in dB with dips at 7.1 MHz (SWR about 1.3) and 52 MHz (about 1.9), invented. */
function sweepFile(): string {
  const lines = [`# ${newPublicId()}`, "Frequency (MHz),S11 (dB)"];
  const dip = (mhz: number, at: number, db: number) => db / (1 + (24 * (mhz / at - at / mhz)) ** 2);
  for (let mhz = 1; mhz <= 60; mhz += 0.05) {
    lines.push(`${mhz.toFixed(2)},${(-0.3 - dip(mhz, 7.1, 17) - dip(mhz, 52, 10)).toFixed(4)}`);
  }
  return lines.join("\n");
}

/** The word stands in everything that is searched. */
async function fill(visibility: "private" | "linked" | "public", word: string) {
  const project = await createProject(
    { title: `${word}title`, summary: `about ${word}summary`, visibility, ituRegion: null },
    owner.id,
  );
  const taken = await takeIn({
    project,
    by: owner,
    file: { name: `${word}file.csv`, bytes: new TextEncoder().encode(sweepFile()) },
    title: `${word}sweep`,
    keepUnread: false,
  });
  expect(taken).toBeTruthy();
  const place = { projectId: project.id, sweepId: null, dipId: null };
  await writeNote({ project, author: owner, place, body: `A ${word}note on it, 40 m, the über choke.` });
  await makeStep(
    { projectId: project.id, by: owner.id },
    { title: `${word}step`, body: `${word}body`, state: "planned", at: null, quantities: [] },
  );
  const element = { key: "a", kind: "vertical" as const, name: `${word}element`, lengthM: 10, count: 1 };
  const unsaid = { heightM: null, diameterMm: null, material: "", insulated: null, where: `${word}where` };
  await inTransaction((tx) =>
    antennas.insert(
      {
        projectId: project.id,
        validFrom: new Date(),
        content: { ...NO_ANTENNA, elements: [{ ...element, ...unsaid }], remarks: `${word}remarks` },
        remark: "",
        stepId: null,
        createdBy: owner.id,
      },
      tx,
    ),
  );
  places[visibility] = project;
}

const WORDS = { private: "zanthar", linked: "quovex", public: "brillig" };
const PARTS = "title summary sweep file note step body element where remarks".split(" ");

beforeAll(async () => {
  owner = await person("Orla Fenwick");
  stranger = await person("Stran Ger");
  former = await person("For Mer");
  other = await person("Other Owner");
  for (const [visibility, word] of Object.entries(WORDS)) {
    await fill(visibility as keyof typeof WORDS, word);
  }
  await projects.insertMember(places.private.id, former.id, "owner");
  await projects.deleteMember(places.private.id, former.id);
  await createProject({ title: "Own", summary: "", visibility: "private", ituRegion: null }, other.id);
});

async function ask(who: Who | null, words: string, dips: DipRange | null = null) {
  const groups = await find({ userId: who?.id ?? null, words, dips, only: null });
  return Object.fromEntries(groups.map(({ kind, results }) => [kind, results.map(({ title }) => title)]));
}

describe("words", () => {
  it.each(PARTS)("of every kind are found by a member: %s", async (part) => {
    const found = await ask(owner, `${WORDS.private}${part}`);
    expect(Object.values(found).flat().length).toBeGreaterThan(0);
  });

  it.each(PARTS)("of a public project are found by anyone, of another by nobody else: %s", async (part) => {
    for (const who of [null, stranger, former, other]) {
      expect(Object.keys(await ask(who, `${WORDS.public}${part}`))).not.toEqual([]);
      for (const hidden of [WORDS.private, WORDS.linked]) {
        expect(await ask(who, `${hidden}${part}`)).toEqual({});
        expect(await ask(who, hidden)).toEqual({});
      }
    }
  });

  it("are each asked for, by their beginning, without case and accents", async () => {
    expect(await ask(owner, "BRILLIG uber")).toMatchObject({ notes: ["Orla Fenwick on the project"] });
    expect(await ask(owner, "brillig absent")).toEqual({});
    expect(await ask(owner, "rillig")).toEqual({});
  });

  it("may be short or common", async () => {
    expect((await ask(owner, "brilligno 40"))?.notes).toHaveLength(1);
    expect((await ask(owner, "brilligno 4 m the"))?.notes).toHaveLength(1);
    expect(await ask(owner, "brilligno 41")).toEqual({});
    expect(await ask(owner, "brilligno 0")).toEqual({});
  });

  it("of a form's own names are not found in antennas", async () => {
    expect(await ask(owner, "insulated")).toEqual({});
    expect(await ask(owner, "vertical")).toEqual({});
  });

  it.each([
    '+-*"',
    '"',
    "brillig* +(",
    "' or 1=1 --",
    "\\",
    "%",
    "@",
    "~<>",
    "`",
    "😀",
    "\u0000",
    "(((",
    "+",
    "a".repeat(199),
  ])("take any sign: %s", async (text) => {
    expect(Object.keys(await ask(stranger, text)).length).toBeLessThanOrEqual(8);
  });

  it("are gone with a note that was removed, and away from who blocked its author", async () => {
    const project = places.public;
    const place = { projectId: project.id, sweepId: null, dipId: null };
    const { publicId } = await writeNote({ project, author: owner, place, body: "brief vorpal" });
    expect((await ask(stranger, "vorpal")).notes).toHaveLength(1);
    await db.insert(blocks).values({ blockerId: stranger.id, blockedId: owner.id, at: new Date() });
    expect(await ask(stranger, "vorpal")).toEqual({});
    await db.delete(blocks);
    await removeNote({ project, notePublicId: publicId, by: owner, mayModerate: false });
    expect(await ask(stranger, "vorpal")).toEqual({});
  });
});

describe("plates and write-ups", () => {
  it("are found as they are shown: the newest version, nothing withdrawn, no draft, by who may read the project", async () => {
    const plate = { ...PLATE, createdAt: new Date() };
    for (const visibility of ["private", "public"] as const) {
      const projectId = places[visibility].id;
      const [{ insertId }] = await db
        .insert(plates)
        .values({ ...plate, projectId, publicId: newPublicId(), version: 1, title: "Old snark" });
      const second = { ...plate, projectId, version: 2, previousId: insertId };
      await db
        .insert(plates)
        .values({ ...second, publicId: newPublicId(), title: `New snark ${visibility}` });
    }
    expect((await ask(stranger, "snark")).plates).toEqual([expect.stringContaining("New snark public")]);
    expect((await ask(owner, "snark")).plates).toHaveLength(2);
    await db.update(plates).set({ withdrawnAt: new Date() }).where(eq(plates.version, 2));
    expect(await ask(owner, "snark")).toEqual({});

    const { public: project } = places;
    const text = { title: "Frumious", body: "A draft of the **bandersnatch**." };
    const publicId = await makeDraft(project, owner, text);
    expect(await ask(owner, "bandersnatch")).toEqual({});
    const found = await writeUps.findByPublicId(publicId);
    if (!found) throw new Error("The write-up is not there.");
    await publish(found.writeUp, found.project, owner, { revision: revisionOf(text), remark: "" });
    await changeDraft(found.writeUp.id, project, text, { ...text, body: "About the jubjub." });
    expect((await ask(null, "bandersnatch frumious"))["write-ups"]).toEqual(["Frumious"]);
    expect(await ask(owner, "jubjub")).toEqual({});
    await takeBack(found.writeUp, owner);
    expect(await ask(owner, "bandersnatch")).toEqual({});
  });
});

const PLATE = {
  number: 1,
  kind: "sweep" as const,
  caption: "",
  licence: "CC-BY-4.0",
  record: "{}",
  recordSha256: "0".repeat(64),
};

describe("people", () => {
  it("are found by those who share a project with them", async () => {
    expect(await ask(other, "orla")).toEqual({});
    await projects.insertMember(places.private.id, stranger.id, "reader");
    expect((await ask(stranger, "orla")).people).toEqual(["Orla Fenwick"]);
    await projects.deleteMember(places.private.id, stranger.id);
    expect(await ask(stranger, "orla")).toEqual({});
    expect(await ask(null, "orla")).toEqual({});
  });
});

describe("numbers", () => {
  it("find dips within a range, and only those that may be read", async () => {
    const range = { ...NONE, fromHz: 50e6, toHz: 54e6 };
    expect((await ask(owner, "", range)).dips).toHaveLength(3);
    expect((await ask(stranger, "", range)).dips).toHaveLength(1);
    expect((await ask(null, "", range)).dips).toHaveLength(1);
    expect(await ask(null, "", { ...range, swrUnder: 1.5 })).toEqual({});
    expect((await ask(null, "", { ...range, swrUnder: 2.5, swrOver: 1.5 })).dips).toHaveLength(1);
    expect((await ask(null, "", { ...NONE, verdict: "open" })).dips).toHaveLength(2);
    expect(await ask(null, "", { ...NONE, verdict: "settled" })).toEqual({});
    expect((await ask(owner, "zanthar", { ...NONE, toHz: 10e6 })).dips).toHaveLength(1);
  });
});

describe("pages", () => {
  it("go on where the one before ended, each result once", async () => {
    const project = places.public;
    const place = { projectId: project.id, sweepId: null, dipId: null };
    const createdAt = new Date("2026-05-01T12:00:00Z");
    for (let i = 0; i < 35; i++) {
      await writeNote({ project, author: owner, place, body: `slithy ${i}`, createdAt });
    }
    const about = { userId: null, words: "slithy", dips: null, only: "notes" as const };
    const [first] = await find(about);
    const [second] = await find({ ...about, cursor: first.nextCursor ?? "" });
    expect([first.results.length, second.results.length, second.nextCursor]).toEqual([30, 5, null]);
    const all = [...first.results, ...second.results].map(({ to }) => to);
    expect(new Set(all).size).toBe(35);
    expect(await find({ ...about, cursor: "nonsense" })).toHaveLength(1);
  });
});
