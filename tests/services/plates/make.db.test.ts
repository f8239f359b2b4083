import { beforeAll, expect, test } from "vitest";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { toTouchstone } from "~/services/exports.server";
import { takeIn } from "~/services/intake.server";
import { propose } from "~/services/plates/compose.server";
import { findMade, type MakePlate, makePlate } from "~/services/plates/make.server";
import { createProject } from "~/services/projects.server";
import { sweepOf } from "./sample.ts";

let asked: Omit<MakePlate, "draw">;

beforeAll(async () => {
  const id = await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada Marsh", email: null });
  const by = { id, name: "Ada Marsh" };
  const about = { title: "Reed bank", summary: "", visibility: "private" as const, ituRegion: 1 };
  const { publicId } = await createProject(about, id);
  const project = (await projects.findWithRole(publicId, id))?.project as projects.Project;
  const sweep = sweepOf([{ hz: 7.1e6, ohm: 40, q: 12 }], 101);
  const bytes = new TextEncoder().encode(toTouchstone(sweep, ["invented"]));
  const file = { name: "loop.s1p", bytes };
  const taken = await takeIn({ project, by, file, title: "Loop", takenAt: null, keepUnread: false });
  if (taken.kind !== "read") throw new Error(JSON.stringify(taken));
  const subject = { kind: "sweep" as const, ids: [taken.sweepPublicId] };
  const choices = await propose(project, subject);
  if ("problem" in choices) throw new Error(choices.problem);
  asked = { project, subject, choices, by };
});

test("one draw makes one plate, however often it is sent, also at the same time", async () => {
  const both = await Promise.all([makePlate({ ...asked, draw: "a" }), makePlate({ ...asked, draw: "a" })]);
  expect(both[1]).toEqual(both[0]);
  expect(await makePlate({ ...asked, draw: "a" })).toEqual(both[0]);
  expect(await plates.findAllByProject(asked.project.id)).toHaveLength(1);
  expect((await findMade(asked, "a"))?.number).toBe(1);
  expect(await findMade(asked, "b")).toBeUndefined();
  expect(await findMade(asked, "")).toBeUndefined();
  // The same draw of somebody else is another one.
  expect(await findMade({ ...asked, by: { id: 0, name: "Bram Sedge" } }, "a")).toBeUndefined();
});

test("four that are frozen at once are all made, one after the other", async () => {
  const before = (await plates.findAllByProject(asked.project.id)).length;
  const made = await Promise.all([1, 2, 3, 4].map(() => makePlate({ ...asked, draw: null })));
  expect(made.filter((one) => "problem" in one)).toEqual([]);
  const rows = await plates.findAllByProject(asked.project.id);
  expect(new Set(rows.map(({ number }) => number)).size).toBe(before + 4);
});
