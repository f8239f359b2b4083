import * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { type Antenna, NO_ANTENNA, type StepQuantity } from "~/measurement/antenna";
import type { Feedline } from "~/measurement/feedline";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { antennaAt, changeAntenna } from "~/services/antennas.server";
import { addPhotograph } from "~/services/photographs.server";
import { groupRepeats } from "~/services/repeats.server";
import { expectedAfter } from "~/services/step-expectations.server";
import { changeStep, makeStep, stepWas } from "~/services/steps.server";
import { keepSettings } from "~/services/sweep-edits.server";
import { joinDip, partDips } from "~/services/trail-corrections.server";
import { changeTrailVerdict, nameTrail } from "~/services/trail-verdicts.server";
import type { Who } from "./cast.ts";
import type { PictureName } from "./pictures.ts";
import { pictureOf } from "./pictures.ts";
import { idOf, type Stage } from "./stage.ts";
import type { DeedStep, On, Step } from "./story.ts";
import { tellSweep } from "./tell-sweep.ts";

/** What people of a story do besides sweeping and talking. */

export function deed(by: Who, at: Date, what: DeedStep["do"]): Step {
  return { kind: "deed", by, at, do: what };
}

/** Says what the antenna is from then on. */
export function described(by: Who, at: Date, remark: string, change: (antenna: Antenna) => Antenna): Step {
  return deed(by, at, async ({ project }, { id }) => {
    const then = await antennaAt(project.id, at);
    const was = then.kind === "described" ? then.version.content : NO_ANTENNA;
    const task = { projectId: project.id, by: id, was, wanted: change(was), validFrom: at, remark, at };
    const kept = await changeAntenna(task);
    if (kept.kind !== "kept") throw new Error(`The demo's antenna: "${remark}" was not kept: ${kept.kind}.`);
  });
}

export interface Changed {
  key: string;
  title: string;
  body?: string;
  quantities?: StepQuantity[];
}

/** A change that was made. */
export function changed(by: Who, at: Date, step: Changed): Step {
  return deed(by, at, (stage, { id }) => writeStep(stage, id, { ...step, state: "done", at }, at));
}

/** A change that is meant to be made: where it should put every trail is reckoned now. */
export function planned(by: Who, at: Date, step: Changed, meantFor: Date | null = null): Step {
  return deed(by, at, (stage, { id }) =>
    writeStep(stage, id, { ...step, state: "planned", at: meantFor }, at),
  );
}

/** The planned change was made. */
export function done(by: Who, at: Date, key: string): Step {
  return deed(by, at, async ({ stepIds, project }, { id }) => {
    const found = await steps.findByPublicId(idOf(stepIds, key, "step"));
    if (!found) throw new Error(`The demo's step "${key}" is gone.`);
    const { step } = found;
    const { title, body, quantities } = step;
    const wanted = { title, body, quantities, state: "done" as const, at };
    const change = await changeStep(
      step.id,
      { projectId: project.id, by: id, now: at },
      stepWas(step),
      wanted,
    );
    if (change.kind !== "kept")
      throw new Error(`The demo's step "${key}" could not be made: ${change.kind}.`);
  });
}

async function writeStep(
  { project, stepIds, told }: Stage,
  by: number,
  {
    key,
    title,
    body = "",
    quantities = [],
    state,
    at,
  }: Changed & { state: "planned" | "done"; at: Date | null },
  now: Date,
): Promise<void> {
  const expected = state === "planned" ? await expectedAfter(project.id, quantities, "metres") : undefined;
  const values = { title, body, state, at, quantities };
  const made = await makeStep({ projectId: project.id, by, now }, values, expected);
  if (made.kind !== "kept") throw new Error(`The demo's step "${title}": ${made.problem.message}`);
  stepIds.set(key, made.publicId);
  told.addStep(key, title, made.publicId);
}

/** Names the trail of a dip, puts others on it by hand that stand far off, and may settle it. */
export function followed(
  by: Who,
  at: Date,
  first: Required<On>,
  { name, others = [], apart = [], settled }: Followed,
): Step {
  return deed(by, at, async (stage, who) => {
    const task = { projectId: stage.project.id, by: who, at };
    const dipOf = ({ sweep, nearMhz }: Required<On>) => stage.told.found(sweep, nearMhz).id;
    for (const [one, other] of apart) await partDips({ ...task, dipId: dipOf(one), otherId: dipOf(other) });
    for (const other of others) {
      const trail = await trailOf(first, stage);
      const joined = await joinDip({ ...task, dipId: dipOf(other), trailId: trail.id });
      if (joined.kind !== "done" && joined.kind !== "already") {
        throw new Error(`The demo's trail "${name}" could not be joined: ${joined.kind}.`);
      }
    }
    await nameTrail({ trail: await trailOf(first, stage), by: who, name, at });
    if (!settled) return;
    const trail = await trailOf(first, stage);
    const asked = { trail, by: who, intent: "settle" as const, text: settled, was: trail.verdict, at };
    const change = await changeTrailVerdict(asked);
    if (change !== "done") throw new Error(`The demo's trail "${name}" could not be settled: ${change}.`);
  });
}

interface Followed {
  name: string;
  /** Dips that belong to it, whatever the pairing says. */
  others?: Required<On>[];
  /** Dips that the pairing took for one, and are not. */
  apart?: [Required<On>, Required<On>][];
  settled?: string;
}

async function trailOf({ sweep, nearMhz }: Required<On>, { told }: Stage): Promise<trails.TrailRow> {
  const trail = await trails.findByDip(told.found(sweep, nearMhz).id);
  if (!trail) throw new Error(`The demo's dip near ${nearMhz} MHz in "${sweep}" is on no trail.`);
  return trail;
}

/** Takes the feedline out of a sweep: its numbers are then those at the antenna. */
export function atTheAntenna(by: Who, at: Date, sweep: string, feedline: Feedline): Step {
  return deed(by, at, async (stage, { id }) => {
    const { publicId } = stage.told.known(sweep);
    const found = await sweeps.findByPublicId(publicId);
    if (!found) throw new Error(`The demo's sweep "${sweep}" is gone.`);
    await keepSettings(found, DEFAULT_SETTINGS, id, "antenna", { feedline });
    await tellSweep(sweep, publicId, stage);
  });
}

/** Says that sweeps are of one and the same thing. */
export function repeated(by: Who, at: Date, keys: string[]): Step {
  return deed(by, at, async ({ project, told }) => {
    const grouped = await groupRepeats(
      project.id,
      keys.map((key) => told.known(key).publicId),
    );
    if (!grouped) throw new Error(`The demo's repeats ${keys.join(", ")} are not there.`);
  });
}

/** A drawn picture where a photograph would be, of the antenna or of a step. */
export function pictured(by: Who, at: Date, picture: PictureName, caption: string, step?: string): Step {
  return deed(by, at, async ({ project, stepIds }, who) => {
    const row = step ? await steps.findByPublicId(idOf(stepIds, step, "step")) : undefined;
    const added = await addPhotograph({
      of: { projectId: project.id, ...(row && { stepId: row.step.id }) },
      project,
      by: who,
      file: { name: `${picture}.png`, bytes: pictureOf(picture) },
      caption,
      at,
    });
    if (added.kind !== "added") throw new Error(`The demo's picture "${picture}": ${added.message}`);
  });
}
