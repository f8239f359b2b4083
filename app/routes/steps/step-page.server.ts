import type { ProjectAccess } from "~/auth/require.server";
import * as antennas from "~/db/antennas.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { renderNote } from "~/services/markdown.server";
import { listThread } from "~/services/note-thread.server";
import { listPhotographs } from "~/services/photographs.server";
import { loadEffect, type StepSide } from "~/services/step-effects.server";
import { stepsBetween } from "~/services/step-sweeps";
import { quantityText } from "~/services/step-words";

/** All that a step's page shows. */
export async function loadStepPage(access: ProjectAccess, found: steps.FoundStep, search: URLSearchParams) {
  const { project, person, may } = access;
  const { step, by } = found;
  const [ordered, listed, designBands, photographs, dismissed, described, thread] = await Promise.all([
    steps.findSweepsInOrder(project.id),
    steps.findAllByProject(project.id),
    projects.findDesignBands(project.id),
    listPhotographs({ projectId: project.id, stepId: step.id }),
    person ? people.findDismissals(person.id) : [],
    antennas.findFirstDay(project.id),
    listThread({ projectId: project.id, sweepId: null, dipId: null, stepId: step.id }, access),
  ]);
  const asked = askedRange(search);
  const effect = await loadEffect(project.id, step, ordered, asked ?? undefined);
  const range = shownRange(effect.before, effect.after, asked);
  const unit = lengthUnitOf(person);
  const others = stepsBetween(
    step,
    listed.map((one) => one.step),
    ordered,
  );
  return {
    project: { publicId: project.publicId },
    mayEdit: may("step.edit"),
    mayWrite: may("note.write"),
    thread,
    dismissed,
    step: {
      publicId: step.publicId,
      title: step.title,
      state: step.state,
      at: step.at,
      by,
      createdAt: step.createdAt,
      quantities: step.quantities.map((quantity) => quantityText(quantity, unit)),
      editsAntenna: step.quantities.some(({ target }) => target),
    },
    bodyHtml: step.body ? renderNote(step.body) : null,
    sharedWith: others.map(({ publicId, title }) => ({ publicId, title })),
    /** The sweep after it was taken before anybody described the antenna. */
    beforeAntenna: described !== undefined && step.at !== null && step.at < described,
    effect: {
      before: effect.before,
      after: effect.after,
      beforeSaid: effect.around.beforeSaid,
      afterSaid: effect.around.afterSaid,
      movements: effect.movements,
      difference: effect.difference,
      expected: effect.expected,
    },
    range,
    zoomed: asked !== null,
    log: search.get("axis") === "log",
    choices: may("step.edit")
      ? ordered.map(({ publicId, title, takenAt }) => ({ publicId, title, takenAt })).reverse()
      : [],
    photographs,
    designBands: designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
    bands: range
      ? bandsOverlapping((project.ituRegion as ItuRegion | null) ?? null, range.fromHz, range.toHz)
      : [],
  };
}
export type StepPageData = Awaited<ReturnType<typeof loadStepPage>>;

/** `?from=6.9&to=7.3` in MHz; null where that is no range. */
function askedRange(search: URLSearchParams): { fromHz: number; toHz: number } | null {
  const [from, to] = ["from", "to"].map((name) => Number(search.get(name) || Number.NaN) * 1e6);
  return from >= 0 && to > from ? { fromHz: from, toHz: to } : null;
}

/** The asked stretch, else what the sweeps cover together. */
function shownRange(
  before: StepSide | null,
  after: StepSide | null,
  asked: { fromHz: number; toHz: number } | null,
) {
  const sides = [before, after].filter((side) => side !== null);
  if (sides.length === 0) return null;
  const fromHz = Math.min(...sides.map(({ startHz }) => startHz));
  const toHz = Math.max(...sides.map(({ stopHz }) => stopHz));
  if (!asked) return { fromHz, toHz };
  const inside = { fromHz: Math.max(asked.fromHz, fromHz), toHz: Math.min(asked.toHz, toHz) };
  return inside.fromHz < inside.toHz ? inside : { fromHz, toHz };
}
