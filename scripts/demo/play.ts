import * as dips from "~/db/dips.server";
import type { NotePlace } from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import type { Evidence } from "~/db/schema/index";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { judgeDip } from "~/services/causes.server";
import { takeIn } from "~/services/intake.server";
import { writeNote } from "~/services/notes.server";
import { addMember, changeBands, createProject } from "~/services/projects.server";
import { chosenEvidence, evidenceFor } from "~/services/verdict-evidence.server";
import { changeVerdict } from "~/services/verdicts.server";
import type { Cast } from "./cast.ts";
import { idOf, type Stage } from "./stage.ts";
import type { On, Rests, Step, Story, SweepStep, VerdictStep } from "./story.ts";
import { tellSweep } from "./tell-sweep.ts";
import { Told } from "./told.ts";

/** Lets a story happen, through the same services that serve everybody. `benchIds` are those of the stories before it. */
export async function play(story: Story, cast: Cast, benchIds: Stage["benchIds"] = new Map()): Promise<void> {
  const { title, summary, visibility, owner } = story;
  const project = await createProject({ title, summary, visibility, ituRegion: 1, demo: 1 }, cast[owner].id);
  for (const { who, role } of story.members) {
    const added = await addMember(project.id, cast[who].userName, role);
    if (added !== "added") throw new Error(`${who} could not be added to "${title}": ${added}.`);
  }
  await changeBands(project.id, story.bands);
  const stage: Stage = {
    cast,
    project,
    told: new Told(`/projects/${project.publicId}`),
    sweepIds: new Map(),
    noteIds: new Map(),
    stepIds: new Map(),
    plateIds: new Map(),
    benchIds,
  };
  for (const step of story.steps) await perform(step, stage);
  await projects.update(project.id, { createdAt: story.steps[0]?.at });
}

async function perform(step: Step, stage: Stage): Promise<void> {
  const by = stage.cast[step.by];
  switch (step.kind) {
    case "sweep":
      return sweep(step, stage);
    case "note": {
      const { publicId } = await writeNote({
        project: stage.project,
        author: by,
        place: placeOf(step.on, stage),
        parentPublicId: step.answers ? idOf(stage.noteIds, step.answers, "note") : null,
        body: step.text(stage.told),
        createdAt: step.at,
      });
      if (step.key) stage.noteIds.set(step.key, publicId);
      return;
    }
    case "verdict":
      return decide(step, by, stage);
    case "deed":
      return step.do(stage, by, step.at);
    default:
      return step satisfies never;
  }
}

async function decide(step: VerdictStep, by: { id: number }, stage: Stage): Promise<void> {
  const { publicId } = stage.told.found(step.on.sweep, step.on.nearMhz);
  const found = await dips.findByPublicId(publicId);
  if (!found) throw new Error(`The demo's dip near ${step.on.nearMhz} MHz is gone.`);
  const evidence = step.rests ? await evidenceOf(found, step.rests, stage) : [];
  const adopted = step.rests?.cause && evidence.find(({ kind }) => kind === "cause");
  const text = adopted ? titleOf(adopted) : step.text(stage.told);
  const change = await changeVerdict({
    dip: found.dip,
    by,
    intent: step.intent,
    text,
    was: found.dip.verdict,
    evidence,
    details: step.rests?.note?.(stage.told),
    at: step.at,
  });
  if (change !== "done") throw new Error(`The demo's verdict "${text}" could not be given: ${change}.`);
}

/** "May be hub to stake, half wave": of "may be hub to stake, half wave: 0.952 × c/…". */
function titleOf({ text }: Evidence): string {
  const title = text.slice(0, text.indexOf(":"));
  return title.charAt(0).toUpperCase() + title.slice(1);
}

async function evidenceOf(
  { dip, sweep }: NonNullable<Awaited<ReturnType<typeof dips.findByPublicId>>>,
  rests: Rests,
  stage: Stage,
): Promise<Evidence[]> {
  const [from, trail] = await Promise.all([sweeps.findByPublicId(sweep.publicId), trails.findByDip(dip.id)]);
  const { causes } = from ? await judgeDip(dip, from.sweep, "metres") : { causes: [] };
  const cause = rests.cause && causes.find(({ part }) => part === rests.cause);
  if (rests.cause && !cause) throw new Error(`Nothing of the demo's ${rests.cause} explains that dip.`);
  const keys = [
    ...(cause ? [`cause:${cause.key}`] : []),
    ...(rests.sweeps ?? []).map((key) => `sweep:${stage.told.known(key).publicId}`),
    ...(rests.steps ?? []).map((key) => `step:${idOf(stage.stepIds, key, "step")}`),
    ...(rests.notes ?? []).map((key) => `note:${idOf(stage.noteIds, key, "note")}`),
  ];
  return chosenEvidence(keys, await evidenceFor(dip, trail?.id ?? null, causes));
}

async function sweep(step: SweepStep, stage: Stage): Promise<void> {
  const taken = await takeIn({
    project: stage.project,
    by: stage.cast[step.by],
    file: { name: step.fileName, bytes: step.bytes },
    title: step.title,
    takenAt: step.at,
    addedAt: new Date(step.at.getTime() + ADDED_LATER_MS),
    given: step.given,
    benchId: step.bench ? idOf(stage.benchIds, step.bench, "bench") : null,
    keepUnread: false,
  });
  if (taken.kind !== "read") throw new Error(`The demo's file ${step.fileName} was not read: ${taken.kind}.`);
  const sweepId = await tellSweep(step.key, taken.sweepPublicId, stage);
  await sweeps.update(sweepId, { createdAt: new Date(step.at.getTime() + ADDED_LATER_MS) });
}

function placeOf({ sweep, nearMhz }: On, { project, sweepIds, told }: Stage): NotePlace {
  const place: NotePlace = { projectId: project.id, sweepId: null, dipId: null };
  if (!sweep) return place;
  const sweepId = idOf(sweepIds, sweep, "sweep");
  return { ...place, sweepId, dipId: nearMhz === undefined ? null : told.found(sweep, nearMhz).id };
}

/** They swept first and added the file when they were home again. */
const ADDED_LATER_MS = 95 * 60 * 1000;
