import type { ProjectRole, Visibility } from "~/auth/permissions";
import { startSession } from "~/auth/session.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as trails from "~/db/trails.server";
import * as writeUps from "~/db/write-ups.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { addAttachment } from "~/services/attachments.server";
import { beginBatch } from "~/services/batch/receive.server";
import { createBench } from "~/services/benches.server";
import { invite } from "~/services/invitations.server";
import { writeNote } from "~/services/notes.server";
import { addPhotograph } from "~/services/photographs.server";
import { createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { makeToken } from "~/services/tokens.server";
import { makeDraft } from "~/services/write-ups/drafts.server";
import { publish, revisionOf } from "~/services/write-ups/publish.server";
import { askApi, Browser, SERVER } from "./browser.ts";

/** People, sessions, tokens and projects for the tests, made in the server's own database by its own code. */

export interface Someone {
  id: number;
  publicId: string;
  userName: string;
}

let count = 0;
const run = Math.random().toString(36).slice(2, 8);

/** A text that is in no other test. */
export function unique(word: string): string {
  count += 1;
  return `${word}-${run}-${process.env.VITEST_POOL_ID ?? 0}-${count}`;
}

export async function makePerson(word = "someone", more: { administrator?: boolean } = {}): Promise<Someone> {
  const userName = unique(word);
  const id = await people.insert({ userName, name: userName, email: `${userName}@example.com`, ...more });
  const user = await people.findById(id);
  if (!user) throw new Error("The person is not there.");
  return { id, publicId: user.publicId, userName };
}

/** The line that sets the cookie of somebody who signed in. */
export function sessionOf(person: Someone): Promise<string> {
  return startSession(new Request(SERVER), person.id);
}

export async function signIn(person: Someone): Promise<Browser> {
  return new Browser(await sessionOf(person));
}

export function tokenOf(person: Someone, scope: "read" | "write" = "write"): Promise<string> {
  return makeToken(person.id, "for a test", scope);
}

export interface Place {
  title: string;
  visibility: Visibility;
  project: string;
  projectId: number;
  sweep: string;
  dip: string;
  /** Written by the commenter. */
  note: string;
  /** With one photograph. */
  bench: string;
  photograph: string;
  /** In a note on the project. */
  attachment: string;
  step: string;
  /** That its dip is on. */
  trail: string;
  /** Made where it is asked for: `freezePlate`. */
  plate: string;
  /** Published. */
  writeUp: string;
  /** Of sweeps, begun. */
  batch: string;
  /** Asked for where it is needed: `askForBundle`. */
  bundle: string;
  /** Made where it is asked for: `waitingMention`. */
  mention: string;
  /** The secret of a link for readers. */
  invitation: string;
}

export type Crew = Record<ProjectRole, Someone>;

/** A project with a member of each role and a second owner; unless empty, one sweep, and a note on its dip. */
export async function makePlace(crew: Crew, visibility: Visibility, empty = false): Promise<Place> {
  const title = unique("A secret title");
  const project = await createProject({ title, summary: "", visibility, ituRegion: null }, crew.owner.id);
  for (const role of ["experimenter", "commenter", "reader"] as const) {
    await projects.insertMember(project.id, crew[role].id, role);
  }
  const second = await makePerson("second");
  await projects.insertMember(project.id, second.id, "owner");
  const by = { id: crew.owner.id, name: crew.owner.userName };
  const door = await invite({ project: { ...project, title }, by, role: "reader", email: null, days: 1 });
  const invitation = door.kind === "made" ? door.path.replace("/invitations/", "") : "";
  const place = { title, visibility, project: project.publicId, projectId: project.id, invitation };
  if (empty)
    return {
      ...place,
      sweep: "",
      dip: "",
      note: "",
      bench: "",
      photograph: "",
      attachment: "",
      step: "",
      trail: "",
      plate: "",
      writeUp: "",
      batch: "",
      mention: "",
      bundle: "",
    };
  const token = await tokenOf(crew.owner);
  const answer = await sendSweep(project.publicId, token, touchstone());
  if (answer.status !== 201) throw new Error(`No sweep: ${answer.status} ${await answer.text()}`);
  const sweep = await answer.json();
  const dip = sweep.dips[0].id;
  const written = await askApi(`/dips/${dip}/notes`, await tokenOf(crew.commenter), {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: JSON.stringify({ body: "A first thought." }),
  });
  const note = (await written.json()).id;
  const bench = await makeBench(project, crew.owner);
  const added = await addPhotograph({
    of: { projectId: project.id, benchId: bench.id },
    project,
    by: crew.owner,
    file: { name: "bridge.png", bytes: onePixel() },
    caption: "",
  });
  const photograph = added.kind === "added" ? added.publicId : "";
  const attachment = await attachFile(project, crew.owner);
  const step = await makeStepOf(project.id, crew.owner.id);
  return {
    ...place,
    sweep: sweep.id,
    dip,
    note,
    bench: bench.publicId,
    photograph,
    attachment,
    step,
    trail: await trailOf(project.id),
    plate: "",
    writeUp: await publishWriteUp(project.publicId, crew.owner),
    batch: await beginBatchOf(project, crew.owner),
    mention: "",
    bundle: "",
  };
}

/** A published write-up without figures; its public id. */
async function publishWriteUp(project: string, by: Someone): Promise<string> {
  const found = await projects.findWithRole(project, by.id);
  if (!found) throw new Error("The project is not there.");
  const draft = { title: "Where the dip comes from", body: "## At first\n\nIt was there.\n" };
  const publicId = await makeDraft(found.project, by, draft);
  const row = await writeUps.findByPublicId(publicId);
  if (!row) throw new Error("The draft is not there.");
  await publish(row.writeUp, found.project, by, { revision: revisionOf(row.writeUp), remark: "" });
  return publicId;
}

async function beginBatchOf(project: { id: number }, by: Someone): Promise<string> {
  const run = await beginBatch(newPublicId(), project, by);
  if (!run) throw new Error("The batch was not begun.");
  return run.publicId;
}

export async function makeCrew(): Promise<Crew> {
  return {
    owner: await makePerson("owner"),
    experimenter: await makePerson("experimenter"),
    commenter: await makePerson("commenter"),
    reader: await makePerson("reader"),
  };
}

/** The trail of the lowest dip. */
async function trailOf(projectId: number): Promise<string> {
  return (await trails.findAllByProject(projectId))[0].publicId;
}

/** A step that changes nothing of the antenna. */
async function makeStepOf(projectId: number, by: number): Promise<string> {
  const at = new Date("2026-01-02T10:00:00Z");
  const values = { title: "More turns", body: "", state: "done" as const, at, quantities: [] };
  const made = await makeStep({ projectId, by }, values);
  return made.kind === "kept" ? made.publicId : "";
}

/** A bench without references, the project's own. */
export async function makeBench(project: { id: number }, by: Someone, name = unique("Bench")) {
  const { bench } = await createBench(
    project,
    by,
    { name, description: "", own: "no" },
    {
      validFrom: new Date("2026-01-01T00:00Z"),
      remark: "",
      parts: [],
      standards: IDEAL_STANDARDS,
      given: NOTHING_GIVEN,
    },
  );
  return bench;
}

/** A sweep file in a note on the project. */
async function attachFile(project: { id: number; publicId: string }, by: Someone): Promise<string> {
  const bytes = new TextEncoder().encode(touchstone());
  const added = await addAttachment({ project, by, file: { name: "loop.s1p", bytes } });
  if (added.kind === "refused") throw new Error(added.message);
  const place = { projectId: project.id, sweepId: null, dipId: null };
  await writeNote({ project, author: by, place, body: `Here it is: ${added.markdown}` });
  return added.publicId;
}

/** A picture of one grey pixel, PNG. */
export function onePixel(): Uint8Array<ArrayBuffer> {
  return new Uint8Array(Buffer.from(ONE_PIXEL, "base64"));
}

export function sendSweep(
  project: string,
  token: string | null,
  text: string,
  fields: Record<string, string> = {},
  name = "sweep.s1p",
): Promise<Response> {
  const form = new FormData();
  form.set("file", new File([text], name));
  for (const [key, value] of Object.entries(fields)) form.set(key, value);
  return askApi(`/projects/${project}/sweeps`, token, { method: "POST", body: form });
}

/** A series resonator of 60 Ω at 7.1 MHz against 50 Ω, 201 points, as a Touchstone file; no two alike. */
export function touchstone(): string {
  count += 1;
  const lines = [`! ${run} ${process.env.VITEST_POOL_ID ?? 0} ${count}, invented`, "# MHz S RI R 50"];
  for (let i = 0; i <= 200; i++) {
    const mhz = 6 + (2.2 * i) / 200;
    const x = 50 * 20 * (mhz / 7.1 - 7.1 / mhz);
    const [re, im] = divide([60 - 50, x], [60 + 50, x]);
    lines.push(`${mhz.toFixed(4)} ${re.toFixed(8)} ${im.toFixed(8)}`);
  }
  return `${lines.join("\n")}\n`;
}

/** Γ of R + jX: (Z − Z0) / (Z + Z0). */
function divide([a, b]: [number, number], [c, d]: [number, number]): [number, number] {
  const n = c * c + d * d;
  return [(a * c + b * d) / n, (b * c - a * d) / n];
}

const ONE_PIXEL =
  "iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAIAAACQd1PeAAAACXBIWXMAAAPoAAAD6AG1e1JrAAAADElEQVQImWPo6OgAAAM0AZmUse0HAAAAAElFTkSuQmCC";
