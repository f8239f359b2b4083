import * as antennas from "~/db/antennas.server";
import { inTransaction, type Transaction } from "~/db/client.server";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import type { ExpectedPlace, StepQuantity } from "~/measurement/antenna";
import { applyQuantities } from "./antenna-changes.ts";
import { antennaAt, insertVersion, withdrawVersion } from "./antennas.server.ts";
import { deleteAttachmentsUnder } from "./attachments.server.ts";
import { record } from "./events.server.ts";
import { mergeEdit } from "./merge-edit.ts";
import { deletePhotographsOf } from "./photographs.server.ts";
import { type QuantityProblem, resolveQuantities } from "./step-quantities.ts";

export interface StepValues {
  title: string;
  /** Markdown. */
  body: string;
  state: "planned" | "done";
  /** Null only for a planned step that has no day yet. */
  at: Date | null;
  quantities: StepQuantity[];
}

export interface StepActor {
  projectId: number;
  by: number | null;
  /** When it is written down, where that is not now. */
  now?: Date;
}

export type StepMade = { kind: "kept"; publicId: string } | { kind: "problem"; problem: QuantityProblem };

/** Writes a step down; what it changes of the antenna becomes a version of its own, in the same write. */
export function makeStep(
  actor: StepActor,
  values: StepValues,
  expected: ExpectedPlace[] = [],
): Promise<StepMade> {
  return inTransaction(async (tx) => {
    await projects.lock(actor.projectId, tx);
    const resolved = await resolveAt(actor.projectId, values, tx);
    if (resolved.problem) return { kind: "problem", problem: resolved.problem };
    const { quantities } = resolved;
    const { id, publicId } = await steps.insert(
      {
        ...values,
        quantities,
        expected,
        projectId: actor.projectId,
        createdBy: actor.by,
        createdAt: actor.now,
      },
      tx,
    );
    await editAntenna({ ...values, quantities }, { id, ...actor }, tx);
    await tell("step.added", { publicId, title: values.title }, actor, tx);
    return { kind: "kept", publicId };
  });
}

export type StepChange =
  | { kind: "kept" }
  | { kind: "problem"; problem: QuantityProblem }
  /** Somebody else changed these to something else; nothing was kept. `mine` could be written as it is. */
  | {
      kind: "conflict";
      conflicts: (keyof StepWas)[];
      mine: (keyof StepWas)[];
      now: StepWas;
      stored: steps.StepRow;
    }
  | { kind: "gone" };

/** How a step's form was filled in when it was opened. */
export type StepWas = { title: string; body: string; at: string | null; quantities: string };

export function stepWas(step: Pick<StepValues, "title" | "body" | "at" | "quantities">): StepWas {
  const { title, body, at, quantities } = step;
  const told = quantities.map(({ label, unit, from, to, target }) => [
    label,
    unit,
    from,
    to,
    target?.part,
    target?.field,
  ]);
  return { title, body, at: at?.toISOString() ?? null, quantities: JSON.stringify(told) };
}

/**
 * Changes a step; what it did to the antenna is taken back and done anew. Marking a planned step as done is the same:
 * what was expected of it stays as it was reckoned, unless `expected` says otherwise.
 */
export function changeStep(
  id: number,
  actor: StepActor,
  was: Partial<StepWas>,
  wanted: StepValues,
  expected?: ExpectedPlace[],
): Promise<StepChange> {
  return inTransaction<StepChange>(async (tx) => {
    await projects.lock(actor.projectId, tx);
    const step = await steps.lock(id, tx);
    if (!step) return { kind: "gone" };
    const now = stepWas(step);
    const sent = stepWas(wanted);
    const { changes, conflicts } = mergeEdit<Entries>({ ...was }, { ...now }, { ...sent });
    if (conflicts.length > 0) {
      const mine = Object.keys(changes);
      return { kind: "conflict", conflicts, mine, now, stored: step } as StepChange;
    }
    // Only what this person changed: the rest may be somebody else's.
    const merged: StepValues = {
      state: wanted.state,
      title: "title" in changes ? wanted.title : step.title,
      body: "body" in changes ? wanted.body : step.body,
      at: "at" in changes ? wanted.at : step.at,
      quantities: "quantities" in changes ? wanted.quantities : step.quantities,
    };
    const number = await withdrawFrom(id, actor.projectId, tx);
    const resolved = await resolveAt(actor.projectId, merged, tx, step.quantities);
    if (resolved.problem) throw new Refused(resolved.problem);
    const values = { ...merged, quantities: resolved.quantities, ...(expected && { expected }) };
    await steps.update(id, values, tx);
    await editAntenna(values, { id, ...actor }, tx, number);
    await tell("step.edited", { publicId: step.publicId, title: wanted.title }, actor, tx);
    return { kind: "kept" };
  }).catch((error): StepChange => {
    if (error instanceof Refused) return { kind: "problem", problem: error.problem };
    throw error;
  });
}

/** The sweeps that a person puts beside a step; null goes back to what the dates say. */
export function confirmSweeps(
  step: Pick<steps.StepRow, "id" | "publicId" | "title">,
  actor: StepActor,
  sweeps: { beforeSweepId: number | null; afterSweepId: number | null },
): Promise<void> {
  return inTransaction(async (tx) => {
    await steps.update(step.id, sweeps, tx);
    await tell("step.edited", step, actor, tx);
  });
}

/** Removes a step, and what it changed of the antenna unless that was changed again since. */
export function deleteStep(
  step: Pick<steps.StepRow, "id" | "publicId" | "title">,
  actor: StepActor,
): Promise<void> {
  return inTransaction(async (tx) => {
    await projects.lock(actor.projectId, tx);
    await withdrawFrom(step.id, actor.projectId, tx);
    await deletePhotographsOf({ projectId: actor.projectId, stepId: step.id }, tx);
    await deleteAttachmentsUnder({ stepId: step.id }, tx);
    await steps.deleteById(step.id, tx);
    await tell("step.deleted", step, actor, tx);
  });
}

type Entries = Record<string, string | null>;

async function resolveAt(
  projectId: number,
  values: StepValues,
  tx: Transaction,
  stored: StepQuantity[] = [],
) {
  const then = await antennaAt(projectId, values.at ?? new Date(), tx);
  return resolveQuantities(
    values.quantities,
    then.kind === "described" ? then.version.content : null,
    stored,
  );
}

/** A done step that points at the antenna makes a version of it. */
async function editAntenna(
  { state, at, quantities, title }: StepValues,
  { id, projectId, by }: StepActor & { id: number },
  tx: Transaction,
  number?: number,
): Promise<void> {
  if (state !== "done" || !at || !quantities.some(({ target }) => target)) return;
  const then = await antennaAt(projectId, at, tx);
  if (then.kind !== "described") return;
  const content = applyQuantities(then.version.content, quantities);
  await insertVersion({ projectId, by, validFrom: at, content, remark: title, stepId: id, number }, tx);
}

/** Takes the step's version back; answers its number, so that the next one keeps its place. */
async function withdrawFrom(stepId: number, projectId: number, tx: Transaction): Promise<number | undefined> {
  const all = await antennas.findAllByProject(projectId, tx);
  const own = all.find(({ version }) => version.stepId === stepId);
  if (own) await withdrawVersion(own.version.id, projectId, tx);
  return own?.version.number;
}

async function tell(
  kind: "step.added" | "step.edited" | "step.deleted",
  { publicId, title }: { publicId: string; title: string },
  { projectId, by, now }: StepActor,
  tx: Transaction,
): Promise<void> {
  await record({ projectId, kind, actorId: by, about: { step: publicId, title }, at: now }, tx);
}

/** Rolls everything back. */
class Refused extends Error {
  constructor(readonly problem: QuantityProblem) {
    super(problem.message);
  }
}
