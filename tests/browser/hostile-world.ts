import { eq } from "drizzle-orm";
import { db, inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import { insertNew } from "~/db/notices.server";
import * as tables from "~/db/schema";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { record } from "~/services/events.server";
import { makeDraft } from "~/services/write-ups/drafts.server";
import { publish, revisionOf } from "~/services/write-ups/publish.server";
import { EVASIONS, MARKDOWN_EVASIONS } from "../fixtures/hostile/evasions.ts";
import { openReport } from "../web/in-a-place.ts";
import { makeCrew, makePlace, type Place, type Someone, unique } from "../web/world.ts";

/** A project in which every text tries to run something. */
export interface HostilePlace extends Place {
  owner: Someone;
  writeUp: string;
}

export async function makeHostilePlace(): Promise<HostilePlace> {
  const crew = await makeCrew();
  const { owner } = crew;
  const place = await makePlace(crew, "public");
  await db.update(tables.users).set({ administrator: true }).where(eq(tables.users.id, owner.id));
  const report = await openReport(place, crew.reader);
  await db.update(tables.reports).set({ reason: HOSTILE }).where(eq(tables.reports.publicId, report));
  await fillLists(place, owner);
  const writeUp = await fillTexts(place, owner);
  return { ...place, owner, writeUp };
}

/** What fits into a column, without the sign that a database takes and a page can't show. */
export function texts(longest: number): string[] {
  return [...EVASIONS.map(([, text]) => text), ...MARKDOWN_EVASIONS]
    .map((text) => text.replaceAll("\u0000", ""))
    .filter((text) => text.length <= longest)
    .slice(0, MOST);
}

/** One row a text: people, projects, sweeps with their files, steps, benches, photographs, attachments, events. */
async function fillLists(place: Place, owner: Someone) {
  const { projectId } = place;
  const at = new Date();
  const of = { projectId, createdAt: at };
  const row = () => ({ publicId: newPublicId(), createdAt: at });
  await inTransaction(async (tx) => {
    for (const name of texts(120)) {
      const [{ insertId: userId }] = await tx
        .insert(tables.users)
        .values({ ...row(), userName: unique("h").toLowerCase(), name, callSign: name.slice(0, 20) });
      await tx.insert(tables.memberships).values({ ...of, userId, role: "commenter" });
    }
    for (const title of texts(160)) {
      const about = { ...row(), updatedAt: at, title, summary: title, visibility: "private" as const };
      const [{ insertId: id }] = await tx.insert(tables.projects).values(about);
      await tx.insert(tables.memberships).values({ ...of, projectId: id, userId: owner.id, role: "owner" });
      const file = { sizeBytes: 1, sha256: newSha(), storageKey: `none/${newPublicId()}` };
      const [{ insertId: fileId }] = await tx
        .insert(tables.files)
        .values({ ...row(), ...of, ...file, name: title });
      await tx.insert(tables.sweeps).values({ ...row(), ...of, fileId, title, takenAt: at });
      await tx.insert(tables.steps).values({
        ...row(),
        ...of,
        title,
        body: title,
        state: "done",
        at,
        quantities: [{ label: title, unit: title.slice(0, 12), from: 1, to: 2, target: null }],
        expected: [],
        updatedAt: at,
      });
      const eventId = await record(
        { projectId, kind: "step.edited", actorId: null, about: { step: place.step, title } },
        tx,
      );
      await insertNew([{ userId: owner.id, projectId, eventId, noteId: null, reason: "follow" }], tx);
    }
    for (const name of texts(80)) {
      const bench = { ...row(), projectId, name, description: name, updatedAt: at };
      const [{ insertId: benchId }] = await tx.insert(tables.benches).values(bench);
      const built = { validFrom: at, remark: name, standards: IDEAL_STANDARDS, given: NOTHING_GIVEN };
      const parts = [{ kind: "cable" as const, text: name }];
      await tx.insert(tables.benchVersions).values({ ...row(), ...built, benchId, number: 1, parts });
      const cable = { name, source: name, k1: 0.01, k2: 0, velocityFactor: 0.66, points: null };
      // Two that differ in a control character only are one name to the database.
      await tx
        .insert(tables.cables)
        .ignore()
        .values({ ...row(), ...of, ...cable });
    }
    const [photograph] = await tx
      .select()
      .from(tables.photographs)
      .where(eq(tables.photographs.projectId, projectId));
    const shown = { ...photograph, id: undefined, benchId: null };
    await tx
      .insert(tables.photographs)
      .values(texts(255).map((name) => ({ ...shown, publicId: newPublicId(), caption: name, name })));
    const [attached] = await tx
      .select()
      .from(tables.attachments)
      .where(eq(tables.attachments.projectId, projectId));
    const files = texts(255).map((name) => ({ ...attached, id: undefined, publicId: newPublicId(), name }));
    await tx.insert(tables.attachments).values(files);
    const links = files.map(
      ({ publicId, name }) => `[${name.replace(/[[\]\\]/g, "")}](attachment:${publicId})`,
    );
    const bodies = [links.join("\n\n"), ...texts(20_000), ...MARKDOWN_EVASIONS];
    await tx
      .insert(tables.notes)
      .values(bodies.map((body) => ({ ...row(), ...of, authorId: owner.id, body })));
  });
}

/** Where a page shows one text, several attempts in one. */
async function fillTexts(place: Place, owner: Someone): Promise<string> {
  const { projectId } = place;
  const { projects, sweeps, trails, dips, users, apiTokens } = tables;
  const text = { title: HOSTILE };
  await db.update(projects).set({ title: HOSTILE, summary: HOSTILE }).where(eq(projects.id, projectId));
  await db.update(users).set({ name: HOSTILE }).where(eq(users.id, owner.id));
  await db.update(sweeps).set(text).where(eq(sweeps.publicId, place.sweep));
  await db.update(tables.benches).set({ name: HOSTILE }).where(eq(tables.benches.publicId, place.bench));
  await db.update(tables.steps).set(text).where(eq(tables.steps.publicId, place.step));
  await db.update(trails).set({ name: HOSTILE, verdictText: HOSTILE }).where(eq(trails.projectId, projectId));
  const verdict = { verdict: "settled" as const, verdictText: HOSTILE, verdictAt: new Date() };
  await db.update(dips).set(verdict).where(eq(dips.projectId, projectId));
  const token = { label: HOSTILE, scope: "read" as const, tokenHash: newSha() };
  await db
    .insert(apiTokens)
    .values({ ...token, publicId: newPublicId(), userId: owner.id, createdAt: new Date() });
  const body = [HOSTILE, ...texts(20_000), ...MARKDOWN_EVASIONS].join("\n\n");
  const project = (await db.select().from(projects).where(eq(projects.id, projectId)))[0];
  const writeUp = await makeDraft(project, owner, { title: HOSTILE, body });
  const [draft] = await db.select().from(tables.writeUps).where(eq(tables.writeUps.publicId, writeUp));
  const remark = HOSTILE;
  await publish(draft, project, owner, { revision: revisionOf(draft), remark });
  await db.insert(tables.plates).values({
    publicId: newPublicId(),
    projectId,
    number: 1,
    version: 1,
    kind: "sweep",
    ...text,
    caption: HOSTILE,
    licence: "CC-BY-4.0",
    record: "{}",
    recordSha256: newSha(),
    createdAt: new Date(),
  });
  return writeUp;
}

function newSha(): string {
  return [...crypto.getRandomValues(new Uint8Array(32))]
    .map((byte) => byte.toString(16).padStart(2, "0"))
    .join("");
}

/** Lists show a hundred rows at most. */
const MOST = 95;
/** Ends attributes, the elements that hold text only, and begins its own; as long as the shortest column. */
export const HOSTILE = "\"'></title></script></textarea><img src=x onerror=alert(1)><svg/onload=alert(2)>";
