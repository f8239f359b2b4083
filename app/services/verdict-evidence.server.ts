import * as notes from "~/db/notes.server";
import type { Evidence } from "~/db/schema";
import * as steps from "~/db/steps.server";
import * as trailStops from "~/db/trail-stops.server";
import { formatFrequency } from "~/measurement/units";
import type { Judgement } from "./causes.server.ts";
import { plainText } from "./markdown.server.ts";

/** All that a verdict on a dip can rest on, as it reads now. `trailId` is that of its trail, null where it is on none. */
export async function evidenceFor(
  { id: dipId, projectId, sweepId }: { id: number; projectId: number; sweepId: number },
  trailId: number | null,
  causes: Judgement["causes"],
): Promise<Evidence[]> {
  const [said, stops, sweeps, listed] = await Promise.all([
    notes.findAllByPlace({ projectId, sweepId, dipId }),
    trailId === null ? [] : trailStops.findAllByTrail(trailId),
    steps.findSweepsInOrder(projectId),
    steps.findAllByProject(projectId),
  ]);
  return withinBounds([
    ...causes.map(
      ({ key, title, arithmetic }): Evidence => ({ kind: "cause", id: key, text: `${title}: ${arithmetic}` }),
    ),
    ...stops.map(stopEvidence),
    ...listed.flatMap(stepEvidence),
    ...sweeps
      .slice(-MOST_SWEEPS)
      .map(({ publicId, title }): Evidence => ({ kind: "sweep", id: publicId, text: title })),
    ...said.flatMap(noteEvidence),
  ]);
}

/** All that a verdict on a trail can rest on: its dips, the sweeps they are of, steps, and what was said of it. */
export async function evidenceForTrail(trail: { id: number; projectId: number }): Promise<Evidence[]> {
  const place = { projectId: trail.projectId, sweepId: null, dipId: null, trailId: trail.id };
  const [said, stops, listed] = await Promise.all([
    notes.findAllByPlace(place),
    trailStops.findAllByTrail(trail.id),
    steps.findAllByProject(trail.projectId),
  ]);
  return withinBounds([
    ...stops.map(stopEvidence),
    ...listed.flatMap(stepEvidence),
    ...stops.map(
      ({ sweepPublicId, sweepTitle }): Evidence => ({ kind: "sweep", id: sweepPublicId, text: sweepTitle }),
    ),
    ...said.flatMap(noteEvidence),
  ]);
}

/** What was chosen, as "kind:id"; what is not there (any more) is left out. */
export function chosenEvidence(keys: readonly string[], offered: readonly Evidence[]): Evidence[] {
  return offered.filter((one) => keys.includes(evidenceKey(one)));
}

export function evidenceKey({ kind, id }: Pick<Evidence, "kind" | "id">): string {
  return `${kind}:${id}`;
}

function stopEvidence(stop: Awaited<ReturnType<typeof trailStops.findAllByTrail>>[number]): Evidence {
  const at = formatFrequency(stop.frequencyHz, stop.frequencyUncertaintyHz);
  return { kind: "dip", id: stop.publicId, text: `${at} in “${stop.sweepTitle}”` };
}

function stepEvidence({ step }: steps.ListedStep): Evidence[] {
  return step.state === "done" ? [{ kind: "step", id: step.publicId, text: step.title }] : [];
}

function noteEvidence({
  note,
  author,
}: Awaited<ReturnType<typeof notes.findAllByPlace>>[number]): Evidence[] {
  if (note.removedAt !== null) return [];
  const text = `${author?.name ?? "A former member"}: ${plainText(note.body, NOTE_CHARACTERS)}`;
  return [{ kind: "note", id: note.publicId, text }];
}

function withinBounds(evidence: Evidence[]): Evidence[] {
  return evidence.map((one) => ({ ...one, text: one.text.slice(0, MOST_CHARACTERS) }));
}

const MOST_SWEEPS = 60;
const NOTE_CHARACTERS = 120;
const MOST_CHARACTERS = 400;
