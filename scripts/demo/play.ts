import * as dips from "~/db/dips.server";
import type { NotePlace } from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { takeIn } from "~/services/intake.server";
import { writeNote } from "~/services/notes.server";
import { decodePoints } from "~/services/points.server";
import { addMember, changeBands, createProject } from "~/services/projects.server";
import { changeVerdict } from "~/services/verdicts.server";
import type { On, Step, Story, SweepStep, Who } from "./story.ts";
import { Told } from "./told.ts";

/** User id and user name of everybody in the story. */
export type Cast = Record<Who, { id: number; userName: string }>;

interface Stage {
  cast: Cast;
  project: { id: number; publicId: string };
  told: Told;
  /** Row ids of the sweeps and public ids of the notes, by key. */
  sweepIds: Map<string, number>;
  noteIds: Map<string, string>;
}

/** Lets a story happen, through the same services that serve everybody. */
export async function play(story: Story, cast: Cast): Promise<void> {
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
        parentPublicId: step.answers ? noteId(step.answers, stage) : null,
        body: step.text(stage.told),
        createdAt: step.at,
      });
      if (step.key) stage.noteIds.set(step.key, publicId);
      return;
    }
    case "verdict": {
      const { id, publicId } = stage.told.found(step.on.sweep, step.on.nearMhz);
      const now = (await dips.findByPublicId(publicId))?.dip.verdict ?? "open";
      const text = step.text(stage.told);
      const change = await changeVerdict({
        dip: { id, projectId: stage.project.id },
        by,
        intent: step.intent,
        text,
        was: now,
        at: step.at,
      });
      if (change !== "done") throw new Error(`The demo's verdict "${text}" could not be given: ${change}.`);
      return;
    }
    default:
      return step satisfies never;
  }
}

async function sweep(step: SweepStep, stage: Stage): Promise<void> {
  const taken = await takeIn({
    project: stage.project,
    by: stage.cast[step.by],
    file: { name: step.fileName, bytes: step.bytes },
    title: step.title,
    takenAt: step.at,
    given: step.given,
    keepUnread: false,
  });
  if (taken.kind !== "read") throw new Error(`The demo's file ${step.fileName} was not read: ${taken.kind}.`);
  const found = await sweeps.findByPublicId(taken.sweepPublicId);
  if (!found?.reading) throw new Error(`The demo's sweep ${step.key} is not there.`);
  await sweeps.update(found.sweep.id, { createdAt: new Date(step.at.getTime() + ADDED_LATER_MS) });
  const [known, parts] = await Promise.all([
    dips.findAllBySweep(found.sweep.id),
    sweeps.findPoints(found.reading.id),
  ]);
  stage.sweepIds.set(step.key, found.sweep.id);
  stage.told.add(step.key, {
    path: `/projects/${stage.project.publicId}/sweeps/${taken.sweepPublicId}`,
    title: taken.title,
    dips: known.map(({ dip }) => ({ publicId: dip.publicId, id: dip.id, numbers: dip.numbers })),
    points: decodePoints(parts),
  });
}

function placeOf({ sweep, nearMhz }: On, { project, sweepIds, told }: Stage): NotePlace {
  const place: NotePlace = { projectId: project.id, sweepId: null, dipId: null };
  if (!sweep) return place;
  const sweepId = sweepIds.get(sweep);
  if (sweepId === undefined) throw new Error(`The demo has no sweep "${sweep}" yet.`);
  return { ...place, sweepId, dipId: nearMhz === undefined ? null : told.found(sweep, nearMhz).id };
}

function noteId(key: string, { noteIds }: Stage): string {
  const publicId = noteIds.get(key);
  if (!publicId) throw new Error(`The demo has no note "${key}" yet.`);
  return publicId;
}

/** They swept first and added the file when they were home again. */
const ADDED_LATER_MS = 95 * 60 * 1000;
