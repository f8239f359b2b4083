import { beforeAll, describe, expect, it } from "vitest";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as sweeps from "~/db/sweeps.server";
import { requirePart } from "~/routes/notes/part.server";
import { takeIn } from "~/services/intake.server";
import { listThread } from "~/services/note-thread.server";
import { NoteProblem, writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";

let ada: { id: number };
let project: { id: number; publicId: string };
let sweep: string;

beforeAll(async () => {
  ada = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  const about = { title: "Reeds", summary: "", visibility: "private" as const, ituRegion: null };
  project = await createProject(about, ada.id);
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let mhz = 6; mhz < 8.205; mhz += 0.01) lines.push(`${mhz.toFixed(2)},${mhz > 7 ? "-3.1" : "-2.9"}`);
  const bytes = new TextEncoder().encode(lines.join("\n"));
  const taken = await takeIn({ project, by: ada, file: { name: "a.csv", bytes }, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`The file was not read: ${taken.kind}.`);
  sweep = taken.sweepPublicId;
});

describe("requirePart", () => {
  it("is no part where no figure is given", async () => {
    expect(await requirePart({ sweep })).toBeUndefined();
    expect(await requirePart({})).toBeUndefined();
  });

  it("takes a stretch, cut to the sweep", async () => {
    expect(await requirePart({ sweep, fromMhz: 7, toMhz: 7.2 })).toEqual({ fromHz: 7e6, toHz: 7.2e6 });
    expect(await requirePart({ sweep, fromMhz: 1, toMhz: 7 })).toMatchObject({ fromHz: 6e6, toHz: 7e6 });
  });

  it.each([
    ["one end alone", { fromMhz: 7 }, /both ends/],
    ["ends the wrong way round", { fromMhz: 7.2, toMhz: 7 }, /both ends/],
    ["an empty stretch", { fromMhz: 7, toMhz: 7 }, /both ends/],
    ["a stretch outside the sweep", { fromMhz: 50, toMhz: 54 }, /6.*MHz to 8\.2/],
    [
      "a region of what has no picture",
      { regionLeft: 1, regionTop: 1, regionWidth: 9, regionHeight: 9 },
      /no picture/,
    ],
    ["both", { fromMhz: 7, toMhz: 7.2, regionLeft: 1 }, /not both/],
  ])("refuses %s", async (_, figures, words) => {
    await expect(requirePart({ sweep, ...figures })).rejects.toThrow(NoteProblem);
    await expect(requirePart({ sweep, ...figures })).rejects.toThrow(words);
  });

  it("is for notes on sweeps alone", async () => {
    await expect(requirePart({ fromMhz: 7, toMhz: 7.2 })).rejects.toThrow(/note on a sweep/);
  });
});

it("keeps the part with the note, and with no other", async () => {
  const sweepId = (await sweeps.findByPublicId(sweep))?.sweep.id ?? 0;
  const place = { projectId: project.id, sweepId, dipId: null };
  const region = { x: 0.25, y: 0.5, width: 0.25, height: 0.125 };
  await writeNote({ project, author: ada, place, body: "here", part: { fromHz: 7e6, toHz: 7.2e6 } });
  await writeNote({ project, author: ada, place, body: "there", part: { region } });
  await writeNote({ project, author: ada, place, body: "everywhere" });
  const thread = await listThread(place, { person: null, may: () => false });
  expect(thread.map(({ part }) => part)).toEqual([
    { stretch: { fromHz: 7e6, toHz: 7.2e6 }, region: null },
    { stretch: null, region },
    null,
  ]);
});
