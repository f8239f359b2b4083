import { Buffer } from "node:buffer";
import sharp from "sharp";
import * as benchRows from "~/db/benches.server";
import { kindNamed } from "~/db/bundle-kinds.server";
import * as bundleRows from "~/db/bundle-rows.server";
import { db } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as mentions from "~/db/webmentions.server";
import { env } from "~/env.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { addAttachment } from "~/services/attachments.server";
import { takeReferences } from "~/services/bench-references.server";
import { createBench } from "~/services/benches.server";
import { takeIn } from "~/services/intake.server";
import { editNote } from "~/services/note-changes.server";
import { writeNote } from "~/services/notes.server";
import { addPhotograph } from "~/services/photographs.server";
import { compose, propose } from "~/services/plates/compose.server";
import { addMember, changeBands, createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { putObject, sha256Of } from "~/services/storage.server";
import { changeVerdict } from "~/services/verdicts.server";
import { benchFile, GOOD_BRIDGE } from "../../tests/bench-files.ts";

/** An invented project with something of every kind, through the services that people use. */
export async function makeFullProject(sweepCount: number) {
  const ada = await somebody("Ada Marsh");
  const bram = await somebody("Bram Sedge");
  const project = await createProject(
    { title: "Reeds & “rushes” <on> the bank", summary: "A *vertical*.", visibility: "public", ituRegion: 1 },
    ada.id,
  );
  await addMember(project.id, bram.userName, "commenter", ada.id);
  await changeBands(project.id, [{ name: "17 m", lowHz: 18.068e6, highHz: 18.168e6, swrLimit: 2 }], ada.id);
  const made = await createBench(
    project,
    ada,
    { name: "Home bridge", description: "On the shelf.", own: "yes" },
    { validFrom: day(1), remark: "built", parts: [], standards: IDEAL_STANDARDS, given: NOTHING_GIVEN },
  );
  await takeReferences(
    { ...made, project, by: ada },
    (["open", "short", "load"] as const).map((kind) => ({
      kind,
      file: { name: `${kind}.csv`, bytes: bytesOf(benchFile(GOOD_BRIDGE, kind)) },
    })),
  );
  const bench = await benchRows.findById(made.bench.id);
  const taken: string[] = [];
  for (let i = 0; i < sweepCount; i++) taken.push(await oneSweep(project, ada, bench?.id ?? null, i));
  await takeIn({
    project,
    by: bram,
    file: { name: "unread ⚙ file.txt", bytes: bytesOf("no numbers\nin here\n") },
    keepUnread: true,
  });
  await speak(project, ada, bram, taken);
  return { project, ada, bram, sweeps: taken };
}

async function oneSweep(
  project: { id: number; publicId: string },
  by: { id: number },
  benchId: number | null,
  i: number,
): Promise<string> {
  const scalar = i % 3 === 2;
  const text = scalar ? benchFile(GOOD_BRIDGE, "antenna", ` ${i}`, 200) : touchstone(i);
  const result = await takeIn({
    project,
    by,
    takenAt: i % 4 === 3 ? null : day(2 + (i % 25)),
    file: { name: scalar ? `Mast ${i}.csv` : `Mast ${i}.s1p`, bytes: bytesOf(text) },
    keepUnread: true,
    benchId: scalar ? benchId : null,
  });
  if (result.kind !== "read") throw new Error(`A sweep was not read: ${JSON.stringify(result)}`);
  return result.sweepPublicId;
}

async function speak(
  project: { id: number; publicId: string },
  ada: people.User,
  bram: people.User,
  taken: string[],
): Promise<void> {
  const first = await sweeps.findByPublicId(taken[0]);
  const dip = first && (await dips.findAllBySweep(first.sweep.id)).at(0)?.dip;
  if (!first || !dip) throw new Error("The first sweep has no dip.");
  const place = { projectId: project.id, sweepId: first.sweep.id, dipId: dip.id };
  const file = { name: "loop.s1p", bytes: bytesOf(touchstone(77)) };
  const attached = await addAttachment({ project, by: bram, file });
  const words = attached.kind === "added" ? attached.markdown : "";
  const step = await makeStep(
    { projectId: project.id, by: ada.id },
    { title: "Cut 30 mm", body: `See #dip:${dip.publicId}.`, state: "done", at: day(3), quantities: [] },
  );
  const body = `Is it the choke? @${bram.userName} #dip:${dip.publicId} ${words} [here](/projects/${project.publicId}/dips/${dip.publicId})`;
  const note = await writeNote({ project, author: ada, place, body });
  await writeNote({ project, author: bram, place, parentPublicId: note.publicId, body: "It is — *surely*." });
  await writeNote({
    project,
    author: bram,
    place: { ...place, dipId: null },
    body: "Noise",
    part: { fromHz: 7e6, toHz: 8e6 },
  });
  await editNote({ project, notePublicId: note.publicId, by: ada, body: body.replace("Is", "Was") });
  await changeVerdict({
    dip,
    by: ada,
    intent: "settle",
    text: "The choke was too small",
    was: "open",
    evidence: [{ kind: "sweep", id: taken[0], text: "first" }],
  });
  const picture = await sharp({ create: { width: 64, height: 48, channels: 3, background: "#7a8" } })
    .png()
    .toBuffer();
  await addPhotograph({
    of: { projectId: project.id },
    project,
    by: ada,
    file: { name: "mast.png", bytes: picture },
    caption: "The mast",
  });
  const plate = await plateOf(project, ada, taken[0], first.file);
  const publicId = newPublicId();
  const made = await bundleRows.insertRows(
    kindNamed("write-ups"),
    [
      {
        projectId: project.id,
        publicId,
        title: "What we found",
        body: `The dip #dip:${dip.publicId}, step #step:${step.kind === "kept" ? step.publicId : ""}.`,
        createdBy: ada.id,
        createdAt: new Date(),
        updatedAt: new Date(),
      },
    ],
    db,
  );
  await mentionsOf(plate, { id: made.get(publicId) ?? 0, publicId }, ada);
}

/** Pages elsewhere that cite both, in every state; what was never looked at stays behind in a bundle. */
async function mentionsOf(plate: Placed, writeUp: Placed, by: { id: number }): Promise<void> {
  for (const [i, state] of (["shown", "verified", "hidden", "gone", "queued"] as const).entries()) {
    const ofPlate = i % 2 === 0;
    const target = ofPlate ? `/plates/${plate.publicId}` : `/write-ups/${writeUp.publicId}`;
    const page = { source: `https://notes.example/page-${newPublicId()}`, target: env.BASE_URL + target };
    const of = ofPlate ? { plateId: plate.id, writeUpId: null } : { plateId: null, writeUpId: writeUp.id };
    const found = await mentions.findByPublicId(await mentions.receive({ ...page, ...of }, db));
    if (!found) throw new Error("The mention is not there.");
    const looked = {
      title: "Reeds and <radials>",
      reason: state === "gone" ? "The page is no longer there." : "",
    };
    const decidedBy = state === "verified" ? null : by.id;
    const seen = state === "queued" ? {} : { ...looked, checkedAt: day(9), decidedBy };
    await mentions.update(found.mention.id, { state, ...seen });
  }
}

interface Placed {
  id: number;
  publicId: string;
}

/** A plate with one form: all of them would take seconds, and their bytes are those of a file like any other. */
async function plateOf(
  project: { id: number; publicId: string },
  by: people.User,
  sweep: string,
  file: { name: string; sha256: string; sizeBytes: number; storageKey: string },
): Promise<Placed> {
  const subject = { kind: "sweep" as const, ids: [sweep] };
  const whole = (await projects.findWithRoleById(project.id, null))?.project;
  if (!whole) throw new Error("The project is not there.");
  const choices = await propose(whole, subject);
  const composed = "problem" in choices ? choices : await compose(whole, subject, choices);
  if ("problem" in composed) throw new Error(String(composed.problem));
  const publicId = newPublicId();
  const at = new Date();
  const record = JSON.stringify({
    format: "swale-plate/1",
    id: publicId,
    number: 1,
    version: 1,
    address: `${env.BASE_URL}/plates/${publicId}`,
    previous: null,
    madeAt: at.toISOString(),
    madeBy: by.name,
    ...composed.record,
  });
  const common = {
    projectId: project.id,
    number: 1,
    kind: "sweep",
    title: "Figure",
    caption: "",
    createdBy: by.id,
  };
  const plate = {
    ...common,
    publicId,
    version: 1,
    licence: "CC-BY-4.0",
    record,
    recordSha256: sha256Of(bytesOf(record)),
    createdAt: at,
  };
  const id = (await bundleRows.insertRows(kindNamed("plates"), [plate], db)).get(publicId) ?? 0;
  const svg = bytesOf(
    '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 1 1"><title>Figure</title></svg>',
  );
  const storageKey = `plates/${publicId}/svg-light-${newPublicId()}`;
  await putObject(storageKey, svg, "image/svg+xml");
  const form = { plateId: id, form: "svg-light", mediaType: "image/svg+xml", sha256: sha256Of(svg) };
  const kept = { ...form, sizeBytes: svg.length, storageKey, createdAt: new Date() };
  await bundleRows.insertRows(kindNamed("plate-forms"), [kept], db);
  const { name, sha256, sizeBytes } = file;
  const source = { plateId: id, role: "sweep", sweep, name, sha256, sizeBytes, storageKey: file.storageKey };
  await bundleRows.insertRows(
    kindNamed("plate-sources"),
    [{ ...source, recipe: JSON.stringify(composed.sources[0].recipe) }],
    db,
  );
  return { id, publicId };
}

async function somebody(name: string): Promise<people.User> {
  const userName = `${name.split(" ")[0].toLowerCase()}-${newPublicId()}`;
  const id = await people.insert({ userName, name, email: `${userName}@fennmarsh.example` });
  return (await people.findById(id)) as people.User;
}

/** A series resonator of 36 Ω near 18.1 MHz, in closed form, 301 points from 14 to 22 MHz. */
function touchstone(i: number): string {
  const lines = [`! invented ${i}`, "# MHz S RI R 50"];
  for (let k = 0; k <= 300; k++) {
    const mhz = 14 + (8 * k) / 300;
    const x = 36 * (10 + (i % 7)) * (mhz / (18.1 + 0.01 * (i % 50)) - (18.1 + 0.01 * (i % 50)) / mhz);
    const [a, b] = [36 - 50, 36 + 50];
    const n = b * b + x * x;
    lines.push(`${mhz.toFixed(6)} ${((a * b + x * x) / n).toFixed(9)} ${((x * b - a * x) / n).toFixed(9)}`);
  }
  return `${lines.join("\n")}\n`;
}

function bytesOf(text: string): Uint8Array<ArrayBuffer> {
  return new Uint8Array(Buffer.from(text));
}

function day(n: number): Date {
  return new Date(Date.UTC(2026, 4, n));
}
