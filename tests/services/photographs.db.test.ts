import { eq } from "drizzle-orm";
import sharp from "sharp";
import { beforeEach, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as photographRows from "~/db/photographs.server";
import { events, jobs } from "~/db/schema";
import { runDueJobs } from "~/services/jobs.server";
import {
  addPhotograph,
  deletePhotograph,
  listPhotographs,
  readPhotograph,
} from "~/services/photographs.server";
import { createProject } from "~/services/projects.server";
import { getObject } from "~/services/storage.server";

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

describe("photographs", () => {
  const picture = () =>
    sharp({ create: { width: 800, height: 400, channels: 3, background: "#7f8a5a" } })
      .withExif({ IFD0: { Make: "Invented" }, IFD3: { GPSLatitude: "52/1 0/1 0/1", GPSLatitudeRef: "N" } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();

  it("are shown upright, small and without what they say of place and camera", async () => {
    const bytes = new Uint8Array(await picture());
    const of = { projectId: project.id };
    const added = await addPhotograph({
      of,
      project,
      by,
      file: { name: "mast.jpg", bytes },
      caption: " The  mast ",
    });
    expect(added.kind).toBe("added");
    expect(await listPhotographs(of)).toEqual([
      { publicId: expect.any(String), caption: "The mast", name: "mast.jpg", width: 400, height: 800 },
    ]);
    const [row] = await photographRows.findAllOf(of);
    expect(await readPhotograph(row, "original")).toEqual(bytes);
    const shown = await sharp(await readPhotograph(row, "shown")).metadata();
    expect(shown).toMatchObject({ width: 400, height: 800, format: "jpeg" });
    expect(shown.exif).toBeUndefined();
    expect(shown.orientation).toBeUndefined();
    expect(await sharp(await readPhotograph(row, "small")).metadata()).toMatchObject({
      width: 320,
      height: 640,
    });
  });

  it("go with their objects, and stay when a late removal looks for them", async () => {
    const bytes = new Uint8Array(await picture());
    const of = { projectId: project.id };
    await addPhotograph({ of, project, by, file: { name: "a.jpg", bytes }, caption: "" });
    const [row] = await photographRows.findAllOf(of);
    const payloads = [row.storageKey, row.shownKey, row.smallKey].map((key) => ({ key }));
    await db.insert(jobs).values(
      payloads.map((payload) => ({
        kind: "delete-object",
        payload,
        runAt: new Date(),
        createdAt: new Date(),
      })),
    );
    await runDueJobs();
    expect((await getObject(row.smallKey)).length).toBeGreaterThan(0);
    await deletePhotograph(row, by);
    const told = await db.select().from(events).where(eq(events.projectId, project.id));
    expect(told.map(({ kind, about }) => [kind, about.title]).slice(-2)).toEqual([
      ["photograph.added", "the antenna"],
      ["photograph.deleted", "the antenna"],
    ]);
    await runDueJobs();
    await expect(getObject(row.smallKey)).rejects.toThrow();
    expect(await listPhotographs(of)).toEqual([]);
  });

  it("refuses what is no picture, in words", async () => {
    const file = { name: "a.txt", bytes: new TextEncoder().encode("no picture") };
    const added = await addPhotograph({ of: { projectId: project.id }, project, by, file, caption: "" });
    expect(added).toEqual({ kind: "refused", message: expect.stringContaining("JPEG, PNG, WebP or AVIF") });
  });
});
