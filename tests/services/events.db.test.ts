import { beforeEach, describe, expect, it } from "vitest";
import { inTransaction } from "~/db/client.server";
import * as events from "~/db/events.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as sweeps from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { record } from "~/services/events.server";
import { takeIn } from "~/services/intake.server";
import { editNote, removeNote } from "~/services/note-changes.server";
import { writeNote } from "~/services/notes.server";
import {
  addMember,
  changeAbout,
  changeBands,
  changeRole,
  createProject,
  removeMember,
} from "~/services/projects.server";
import { groupRepeats, leaveRepeats } from "~/services/repeats.server";
import { deleteSweep, keepSettings, keepTitleAndDate, readAnew } from "~/services/sweep-edits.server";
import { changeVerdict } from "~/services/verdicts.server";

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

/** Invented: S11 in dB with one dip. */
function sweepFile(mhz: number): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 400; i++) {
    const f = 1 + (39 * i) / 400;
    lines.push(`${f.toFixed(6)},${(-0.3 - 20 / (1 + (14 * (f / mhz - mhz / f)) ** 2)).toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function take(title: string, mhz: number): Promise<sweeps.FoundSweep> {
  const file = { name: `${title}.csv`, bytes: sweepFile(mhz) };
  const taken = await takeIn({ project, by, file, title, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${title}: ${taken.kind}`);
  return find(taken.sweepPublicId);
}

async function find(publicId: string): Promise<sweeps.FoundSweep> {
  return (await sweeps.findByPublicId(publicId)) as sweeps.FoundSweep;
}

/** What was written down since this was last asked. */
let seen = 0;
async function told(): Promise<string[]> {
  const rows = await events.findAfter([{ projectId: project.id, after: seen }], 500);
  seen = rows.at(-1)?.id ?? seen;
  return rows.map(({ kind, about }) => `${kind}: ${about.title}`);
}

describe("what happens in a project is written down", () => {
  it("of sweeps", async () => {
    const one = await take("one", 7.1);
    const two = await take("two", 7.2);
    expect(await told()).toEqual(["sweep.added: one", "sweep.added: two"]);

    const { takenAt } = one.sweep;
    await keepTitleAndDate(one.sweep, {}, { title: "first", takenAt }, by.id);
    await keepTitleAndDate(one.sweep, {}, { title: "first", takenAt }, by.id);
    expect(await told(), "nothing where nothing changed").toEqual(["sweep.edited: first"]);

    await keepSettings(one, { ...DEFAULT_SETTINGS, swrLimit: 3 }, by.id);
    expect(await readAnew(two, {}, DEFAULT_SETTINGS, by.id)).toBeNull();
    expect(await told()).toEqual(["sweep.analysed: first", "sweep.read-anew: two"]);

    await groupRepeats(project.id, [one.sweep.publicId, two.sweep.publicId], by.id);
    await leaveRepeats((await find(two.sweep.publicId)).sweep, by.id);
    expect(await told()).toEqual(["sweep.edited: 2 sweeps are repeats of one another", "sweep.edited: two"]);

    await deleteSweep(two, by.id);
    expect(await told()).toEqual(["sweep.deleted: two"]);
  });

  it("of notes and verdicts, and nothing of what a note says", async () => {
    const { sweep } = await take("one", 7.1);
    const place = { projectId: project.id, sweepId: sweep.id, dipId: null };
    const { publicId } = await writeNote({ project, author: by, place, body: "A secret of the reeds" });
    await editNote({ project, notePublicId: publicId, by, body: "Another secret" });
    await removeNote({ project, notePublicId: publicId, by, mayModerate: false });
    const dip = (await find(sweep.publicId)).analysis?.dips[0].publicId ?? "";
    const [{ id }] = await dipRows(dip);
    await changeVerdict({
      dip: { id, projectId: project.id },
      by,
      intent: "propose",
      text: "Reeds",
      was: "open",
    });
    const lines = await told();
    expect(lines.map((line) => line.split(":")[0])).toEqual([
      "sweep.added",
      "note.added",
      "note.edited",
      "note.removed",
      "note.added",
      "verdict.given",
    ]);
    expect(lines.join()).not.toContain("secret");
  });

  it("of members and of the project itself", async () => {
    const userName = `bram-${newPublicId()}`;
    await people.insert({ userName, name: "Bram", email: null });
    await addMember(project.id, userName, "reader", by.id);
    expect(await addMember(project.id, userName, "owner", by.id)).toBe("already");
    await changeRole(project.id, userName, "commenter", by.id);
    await removeMember(project.id, userName, by.id);
    const about = { title: "Reed bank", summary: "", visibility: "linked" as const, ituRegion: null };
    await changeAbout(project.id, {}, about, by.id);
    await changeAbout(project.id, {}, about, by.id);
    await changeBands(project.id, [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 }], by.id);
    expect(await told()).toEqual([
      "member.joined: Bram",
      "member.changed: Bram",
      "member.left: Bram",
      "project.changed: Reed bank",
      "project.changed: The design bands",
    ]);
  });
});

describe("the order of what is written down", () => {
  it("is the order of commits: twenty who write at once, and a reader who always reads on from the last id", async () => {
    const WRITERS = 20;
    const EACH = 5;
    const read: number[] = [];
    let writing = true;
    const reader = (async () => {
      let after = seen;
      for (let last = false; !last; ) {
        last = !writing;
        const rows = await events.findAfter([{ projectId: project.id, after }], 500);
        read.push(...rows.map(({ id }) => id));
        after = rows.at(-1)?.id ?? after;
      }
    })();
    const written = await Promise.all(
      Array.from({ length: WRITERS }, async (_, writer) => {
        const ids: number[] = [];
        for (let n = 0; n < EACH; n++) {
          const about = { title: `${writer}.${n}` };
          ids.push(
            await inTransaction(async (tx) => {
              const id = await record(
                { projectId: project.id, kind: "note.added", actorId: by.id, about },
                tx,
              );
              // Time for somebody else to come in between, were that possible.
              await new Promise((resolve) => setTimeout(resolve, Math.random() * 5));
              return id;
            }),
          );
        }
        return ids;
      }),
    );
    writing = false;
    await reader;
    expect(read).toHaveLength(WRITERS * EACH);
    expect(read).toEqual(written.flat().sort((a, b) => a - b));
  });
});

async function dipRows(publicId: string) {
  const dips = await import("~/db/dips.server");
  const found = await dips.findByPublicId(publicId);
  return found ? [found.dip] : [];
}

describe("two people who change one thing", () => {
  it("the later one is asked, with nothing written, and no event tells of it", async () => {
    const { sweep } = await take("one", 7.1);
    await told();
    const was = { title: "one", takenAt: null };
    await keepTitleAndDate(sweep, was, { title: "hers", takenAt: null }, by.id);
    const at = new Date("2026-05-01T10:00:00Z");
    const asked = await keepTitleAndDate(sweep, was, { title: "his", takenAt: at }, by.id);
    expect(asked).toEqual({
      asked: [{ name: "title", mine: "his", theirs: "hers" }],
      rest: { takenAt: "2026-05-01T10:00" },
      was: JSON.stringify({ title: "hers", takenAt: null }),
    });
    expect((await find(sweep.publicId)).sweep.title).toBe("hers");
    expect(await told()).toEqual(["sweep.edited: hers"]);
    const now = JSON.parse(asked?.was ?? "");
    expect(await keepTitleAndDate(sweep, now, { title: "his", takenAt: at }, by.id)).toBeNull();
    expect(await told()).toEqual(["sweep.edited: his"]);
  });
});
