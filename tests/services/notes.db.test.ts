import { asc, eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import * as benches from "~/db/benches.server";
import { db } from "~/db/client.server";
import { events } from "~/db/schema";
import * as steps from "~/db/steps.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { createBench } from "~/services/benches.server";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { countNotes, listThread } from "~/services/note-thread.server";
import { NoteProblem } from "~/services/notes.server";
import { makeStep } from "~/services/steps.server";
import { ada, as, asAda, begin, bram, newProject, place, project, text, write } from "./note-writers.ts";

beforeEach(begin);

describe("writeNote", () => {
  it("stores a note with line ends of one kind", async () => {
    await write(ada, "one\r\ntwo\r\n\r\n");
    const [note] = await listThread(place, asAda());
    expect(note.body).toBe("one\ntwo");
    expect(note.html).toBe("<p>one\ntwo</p>\n");
    expect(note.author?.name).toBe("Ada");
  });

  it.each(["", "  \n\t ", "\r\n"])("refuses %j and stores nothing", async (body) => {
    await expect(write(ada, body)).rejects.toThrow(NoteProblem);
    expect(await listThread(place, asAda())).toEqual([]);
  });

  it("takes as many characters as a note may have, and no more", async () => {
    await write(ada, "x".repeat(MAX_NOTE_CHARACTERS));
    await expect(write(ada, "x".repeat(MAX_NOTE_CHARACTERS + 1))).rejects.toThrow(/20001 characters/);
    expect(countNotes(await listThread(place, asAda()))).toBe(1);
  });

  it("keeps every character", async () => {
    await write(ada, "λ/4 ≈ 4,1 m 😀 \u0000 '\"\\");
    expect((await listThread(place, asAda()))[0].body).toBe("λ/4 ≈ 4,1 m 😀 \u0000 '\"\\");
  });

  it("stores what is sent twice once, also at the same time", async () => {
    const clientKey = crypto.randomUUID();
    const sent = await Promise.all(Array.from({ length: 6 }, () => write(ada, "once", { clientKey })));
    const again = await write(ada, "once", { clientKey });
    expect(new Set([...sent, again].map((note) => note.publicId)).size).toBe(1);
    expect(countNotes(await listThread(place, asAda()))).toBe(1);
  });

  it("tells the keys of two people apart", async () => {
    const clientKey = crypto.randomUUID();
    const first = await write(ada, "mine", { clientKey });
    const second = await write(bram, "mine too", { clientKey });
    expect(second.publicId).not.toBe(first.publicId);
  });

  it("lets many write at once", async () => {
    await Promise.all(Array.from({ length: 12 }, (_, i) => write(i % 2 ? ada : bram, `note ${i}`)));
    expect(countNotes(await listThread(place, asAda()))).toBe(12);
  });

  it("answers only what stands in the same place", async () => {
    const other = await newProject();
    const { publicId } = await write(ada, "here");
    const elsewhere = { ...place, projectId: other.id };
    await expect(
      write(bram, "no", { place: elsewhere, project: other, parentPublicId: publicId }),
    ).rejects.toThrow(NoteProblem);
    await expect(write(bram, "no", { parentPublicId: "nothing-there" })).rejects.toThrow(NoteProblem);
    expect(await listThread(elsewhere, asAda())).toEqual([]);
  });
});

describe("where a note stands", () => {
  const at = new Date("2026-05-01T12:00:00Z");

  it("keeps the threads of a step, a bench and the project apart", async () => {
    const made = await makeStep(
      { projectId: project.id, by: ada.id },
      { title: "More turns", body: "", state: "done", at, quantities: [] },
    );
    const step = made.kind === "kept" ? (await steps.findByPublicId(made.publicId))?.step : undefined;
    const details = {
      validFrom: at,
      remark: "",
      parts: [],
      standards: IDEAL_STANDARDS,
      given: NOTHING_GIVEN,
    };
    const { bench } = await createBench(
      project,
      ada,
      { name: "Bridge", description: "", own: "no" },
      details,
    );
    const on = {
      step: { ...place, stepId: step?.id ?? 0 },
      bench: { ...place, benchId: (await benches.findByPublicId(bench.publicId))?.bench.id ?? 0 },
      project: place,
    };
    const first = await write(ada, "on the step", { place: on.step });
    await write(ada, "on the bench", { place: on.bench });
    await write(ada, "on the project", { place: on.project });
    for (const [kind, there] of Object.entries(on)) {
      expect((await listThread(there, asAda())).map(({ html }) => text(html))).toEqual([`on the ${kind}`]);
    }
    await expect(write(bram, "no", { place: on.bench, parentPublicId: first.publicId })).rejects.toThrow(
      NoteProblem,
    );
    const told = await db
      .select({ kind: events.kind, about: events.about })
      .from(events)
      .where(eq(events.projectId, project.id))
      .orderBy(asc(events.id));
    expect(told.filter(({ kind }) => kind === "note.added").map(({ about }) => about.title)).toEqual([
      "the step More turns",
      "the bench Bridge",
      "the project",
    ]);
    expect(JSON.stringify(told)).not.toContain("on the step");
  });
});

describe("listThread", () => {
  it("puts every answer under the note that began it, oldest first", async () => {
    const first = await write(ada, "first");
    const second = await write(ada, "second");
    const answer = await write(bram, "to first", { parentPublicId: first.publicId });
    const deeper = await write(ada, "to the answer", { parentPublicId: answer.publicId });
    await write(bram, "to the deeper one", { parentPublicId: deeper.publicId });
    await write(bram, "to second", { parentPublicId: second.publicId });
    const thread = await listThread(place, asAda());
    expect(thread.map((note) => [text(note.html), note.replies.map((reply) => text(reply.html))])).toEqual([
      ["first", ["to first", "to the answer", "to the deeper one"]],
      ["second", ["to second"]],
    ]);
    expect(thread[0].replies.map((reply) => reply.answers)).toEqual([
      null,
      { publicId: answer.publicId, author: "Bram" },
      { publicId: deeper.publicId, author: "Ada" },
    ]);
    expect(countNotes(thread)).toBe(6);
  });

  it.each([
    ["owner", true, { mayEdit: false, mayRemove: true }],
    ["experimenter", true, { mayEdit: false, mayRemove: false }],
    ["reader", false, { mayEdit: false, mayRemove: false }],
  ] as const)("offers a %s what the role may do", async (role, writes, onOthers) => {
    await write(ada, "Ada's");
    await write(bram, "Bram's");
    const thread = await listThread(place, as(bram, role));
    expect(thread[0]).toMatchObject(onOthers);
    expect(thread[1]).toMatchObject({ mayEdit: writes, mayRemove: writes });
    expect(thread[0].body).toBeNull();
  });

  it("offers a visitor nothing", async () => {
    await write(ada, "Ada's");
    expect((await listThread(place, as(null, "reader")))[0]).toMatchObject({
      body: null,
      mayEdit: false,
      mayRemove: false,
    });
  });

  it("is empty where nothing was said", async () => {
    expect(await listThread(place, asAda())).toEqual([]);
  });
});
