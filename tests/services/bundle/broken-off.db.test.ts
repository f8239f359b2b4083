import { randomBytes } from "node:crypto";
import { Readable } from "node:stream";
import { beforeAll, describe, expect, it, vi } from "vitest";
import * as runs from "~/db/bundle-runs.server";
import { db } from "~/db/client.server";
import * as files from "~/db/files.server";
import * as people from "~/db/people.server";
import * as schema from "~/db/schema/index";
import { askForBundle, askForMine, giveBundle, offered } from "~/services/bundle/runs.server";
import * as store from "~/services/bundle/store.server";
import { workOnBundles } from "~/services/bundle/work.server";
import { closeAccount } from "~/services/closing.server";
import { takeIn } from "~/services/intake.server";
import { runDueJobs } from "~/services/jobs.server";
import { createProject, deleteProject } from "~/services/projects.server";
import { getObject, putObject, sha256Of } from "~/services/storage.server";
import { keysOf } from "../../../scripts/admin/objects.ts";
import { storageClient } from "../../../scripts/stack/storage.ts";
import { bagOf, payload, zipOf } from "./bags.ts";

let ada: people.User;

async function somebody(name: string): Promise<people.User> {
  const id = await people.insert({
    userName: `${name}-${Date.now()}`,
    name,
    email: `${name}@fennmarsh.example`,
  });
  return (await people.findById(id)) as people.User;
}

/** A project with files that are more than a part of an upload. */
async function largeProject() {
  const project = await createProject(
    { title: "Large", summary: "", visibility: "private", ituRegion: null },
    ada.id,
  );
  for (let i = 0; i < 3; i++) {
    const bytes = randomBytes(5_500_000);
    const storageKey = `originals/${project.publicId}/${i}`;
    await putObject(storageKey, bytes);
    const [sizeBytes, sha256] = [bytes.length, sha256Of(bytes)];
    await files.insert(
      { projectId: project.id, name: `${i}.bin`, sizeBytes, sha256, storageKey, uploadedBy: ada.id },
      db,
    );
  }
  return project;
}

async function objectKeys(): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of keysOf(storageClient(process.env), process.env.S3_BUCKET ?? "")) keys.push(key);
  return keys.sort();
}

async function bundleOf(publicId: string): Promise<Buffer> {
  const offer = offered((await runs.findByPublicId(publicId)) as runs.ShownRun);
  if (!offer) throw new Error(JSON.stringify(await runs.findByPublicId(publicId)));
  return Buffer.from(await getObject(offer.storageKey));
}

beforeAll(async () => {
  ada = await somebody("ada");
});

describe("a bundle whose making was broken off", () => {
  it("is gone on with after the last part, and is whole", async () => {
    const project = await largeProject();
    const asked = await askForBundle(project.id, ada.id);
    const again = await askForBundle(project.id, ada.id);
    expect([again.run.publicId, again.there]).toEqual([asked.run.publicId, true]);
    // The process dies at its second checkpoint: nothing of it is heard any more.
    const kept = runs.keep;
    let checkpoints = 0;
    const dying = vi.spyOn(runs, "keep").mockImplementation(async (id, had, values, tx) => {
      if (values.resume) checkpoints++;
      if (checkpoints >= 3) throw new Error("killed");
      return kept(id, had, values, tx);
    });
    await workOnBundles();
    dying.mockRestore();
    const half = await runs.findByPublicId(asked.run.publicId);
    expect(half).toMatchObject({ state: "running", storageKey: null });
    expect(half?.doneParts).toBeGreaterThan(0);
    const begin = vi.spyOn(store.PartUpload, "begin");
    await workOnBundles(undefined, -1000);
    expect(begin).not.toHaveBeenCalled();
    begin.mockRestore();
    const resumed = await bundleOf(asked.run.publicId);
    const given = await giveBundle(ada.id, Readable.from([resumed]));
    await workOnBundles();
    expect(given.kind === "given" && (await runs.findByPublicId(given.run.publicId))?.state).toBe("done");
  }, 90_000);

  it("leaves nothing in the store when its project is deleted", async () => {
    const before = await objectKeys();
    const project = await largeProject();
    await askForBundle(project.id, ada.id);
    await workOnBundles();
    await deleteProject(project.id);
    await runDueJobs();
    expect(await objectKeys()).toEqual(before);
  });
});

describe("a bundle that is refused, or whose taking-in was broken off", () => {
  const count = async () => [
    (await db.select().from(schema.projects)).length,
    (await db.select().from(schema.users)).length,
    await objectKeys(),
  ];

  it("leaves nothing behind, and says why", async () => {
    const before = await count();
    const files = bagOf(payload());
    files["data/records/notes.json"] += " ";
    const given = await giveBundle(ada.id, Readable.from([await zipOf(Object.entries(files))]));
    await workOnBundles();
    const run = given.kind === "given" ? await runs.findByPublicId(given.run.publicId) : undefined;
    expect(run?.state).toBe("failed");
    expect(run?.report).toEqual({
      faults: ["“data/records/notes.json” is not what it was when the bundle was made: its sum differs."],
    });
    expect(await count()).toEqual(before);
  });

  it.each([
    "a text longer than its column takes",
    "one number twice",
    "a text nested deep",
    "a text nested without end",
  ])("says so at once of %s, for trying again helps nobody", async (what) => {
    const before = await count();
    const at = "2026-05-03T00:00:00.000Z";
    const draft = { id: "w2w2w2w2w2", title: "x", body: "", publishedNumber: null, takenBackAt: null };
    const version = { writeUp: draft.id, number: 1, title: "x", body: "", frozen: "{}", remark: "" };
    const nested = (deep: number) => `${"[".repeat(deep)}${"]".repeat(deep)}`;
    const happened = { kind: "project.changed", actor: null, about: { title: "x" }, at };
    const deeply = (deep: number) =>
      JSON.stringify(happened).replace('"about":{', `"about":{"more":${nested(deep)},`);
    const files = payload();
    const put = (kind: string, lines: string[]) => {
      files[`data/records/${kind}.json`] =
        `{"kind":"${kind}","format":1,"records":[\n${lines.join(",\n")}\n]}\n`;
    };
    if (what.startsWith("a text longer")) {
      const step = { id: "s2s2s2s2s2", title: "x", body: "x".repeat(100_000), state: "done", at };
      const links = { beforeSweep: null, afterSweep: null, createdBy: null };
      const rest = { quantities: [], expected: [], ...links, createdAt: at, updatedAt: at };
      put("steps", [JSON.stringify({ ...step, ...rest })]);
    } else if (what.startsWith("one number")) {
      put("write-ups", [JSON.stringify({ ...draft, createdBy: null, createdAt: at, updatedAt: at })]);
      const published = JSON.stringify({ ...version, publishedBy: null, publishedAt: at });
      put("write-up-versions", [published, published]);
    } else put("activity", [deeply(what.endsWith("end") ? 20_000 : 60)]);
    const given = await giveBundle(ada.id, Readable.from([await zipOf(Object.entries(bagOf(files)))]));
    await workOnBundles();
    const run = given.kind === "given" ? await runs.findByPublicId(given.run.publicId) : undefined;
    expect(run).toMatchObject({ state: "failed", report: { faults: [expect.any(String)] } });
    expect(await count()).toEqual(before);
  });

  it("is cleared and begun anew by the next process", async () => {
    const before = await count();
    const given = await giveBundle(ada.id, Readable.from([await zipOf(Object.entries(bagOf(payload())))]));
    if (given.kind !== "given") throw new Error(given.kind);
    const kept = runs.keep;
    const dying = vi.spyOn(runs, "keep").mockImplementation(async (id, had, values, tx) => {
      if (values.state === "done" || values.state === "waiting") throw new Error("killed");
      return kept(id, had, values, tx);
    });
    await workOnBundles();
    dying.mockRestore();
    const half = await db.select().from(schema.projects);
    expect(half.length).toBe(Number(before[0]) + 1);
    expect(
      (await db.select().from(schema.memberships)).some((row) => row.projectId === half.at(-1)?.id),
    ).toBe(false);
    await workOnBundles(undefined, -1000);
    const run = await runs.findByPublicId(given.run.publicId);
    expect(run?.state).toBe("done");
    expect((await db.select().from(schema.projects)).length).toBe(Number(before[0]) + 1);
  });
});

describe("all my data", () => {
  it("holds what is mine, and goes when the account is closed", async () => {
    const bram = await somebody("bram");
    const project = await createProject(
      { title: "Mine", summary: "", visibility: "private", ituRegion: null },
      ada.id,
    );
    const bytes = new Uint8Array(Buffer.from("no numbers, but mine"));
    await takeIn({ project, by: bram, file: { name: "own.txt", bytes }, keepUnread: true });
    const [asked, twice] = await Promise.all([askForMine(bram.id), askForMine(bram.id)]);
    expect([twice.run.publicId, asked.there !== twice.there]).toEqual([asked.run.publicId, true]);
    await workOnBundles();
    const zip = await bundleOf(asked.run.publicId);
    expect(zip.includes("no numbers, but mine")).toBe(true);
    expect(zip.includes("data/profile.json")).toBe(true);
    await closeAccount(bram.id, "stay");
    await runDueJobs();
    expect(await runs.findByPublicId(asked.run.publicId)).toBeUndefined();
    expect((await objectKeys()).filter((key) => key.includes(asked.run.publicId))).toEqual([]);
  });
});
