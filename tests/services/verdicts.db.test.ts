import { beforeEach, describe, expect, it } from "vitest";
import { mayInProject } from "~/auth/permissions";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import { listThread } from "~/services/note-thread.server";
import { createProject } from "~/services/projects.server";
import { changeVerdict, type VerdictIntent } from "~/services/verdicts.server";
import { addBareDip } from "./bare-dip.ts";

let ada: { id: number };
let dipPublicId: string;

beforeEach(async () => {
  ada = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  const project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    ada.id,
  );
  dipPublicId = (await addBareDip(project.id)).publicId;
});

async function found() {
  const row = await dips.findByPublicId(dipPublicId);
  if (!row) throw new Error("The dip is not there.");
  return row.dip;
}

async function change(intent: VerdictIntent, text: string, was?: dips.DipRow["verdict"]) {
  const dip = await found();
  return changeVerdict({ dip, by: ada, intent, text, was: was ?? dip.verdict });
}

async function threadOf(dip: dips.DipRow) {
  const place = { projectId: dip.projectId, sweepId: dip.sweepId, dipId: dip.id };
  return listThread(place, { person: ada, may: (action) => mayInProject("owner", action) });
}

describe("changeVerdict", () => {
  it("goes from open over proposed to settled and back, and the thread tells it", async () => {
    expect(await change("propose", "  the feedline's braid ")).toBe("done");
    expect(await found()).toMatchObject({ verdict: "proposed", verdictText: "the feedline's braid" });
    expect(await change("settle", "the braid, as the choke showed")).toBe("done");
    expect(await found()).toMatchObject({ verdict: "settled", verdictBy: ada.id });
    expect(await change("reopen", "it came back")).toBe("done");
    expect(await found()).toMatchObject({ verdict: "open", verdictText: "it came back" });
    expect((await threadOf(await found())).map((note) => note.body)).toEqual([
      "**Verdict proposed:** the feedline's braid",
      "**Verdict settled:** the braid, as the choke showed",
      "**Verdict reopened:** it came back",
    ]);
  });

  it.each([
    ["reopen", []],
    ["propose", ["settle"]],
    ["settle", ["settle"]],
  ] as const)("does not %s where that makes no sense", async (intent, before) => {
    for (const step of before) await change(step, "so");
    const dip = await found();
    expect(await change(intent, "no")).toBe("not-now");
    expect(await found()).toEqual(dip);
    expect(await threadOf(dip)).toHaveLength(before.length);
  });

  it("changes nothing when it was changed meanwhile", async () => {
    const [first, second] = await Promise.all([
      change("settle", "this", "open"),
      change("settle", "that", "open"),
    ]);
    expect([first, second].sort()).toEqual(["changed-since", "done"]);
    expect(await threadOf(await found())).toHaveLength(1);
  });

  it("says that a dip is gone", async () => {
    const gone = { id: 0, projectId: 0 };
    expect(await changeVerdict({ dip: gone, by: ada, intent: "settle", text: "x", was: "open" })).toBe(
      "missing",
    );
  });
});
