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
  return [
    ...causes.map(
      ({ key, title, arithmetic }): Evidence => ({ kind: "cause", id: key, text: `${title}: ${arithmetic}` }),
    ),
    ...stops.map(({ publicId, frequencyHz, frequencyUncertaintyHz, sweepTitle }): Evidence => {
      const at = formatFrequency(frequencyHz, frequencyUncertaintyHz);
      return { kind: "dip", id: publicId, text: `${at} in “${sweepTitle}”` };
    }),
    ...listed
      .filter(({ step }) => step.state === "done")
      .map(({ step }): Evidence => ({ kind: "step", id: step.publicId, text: step.title })),
    ...sweeps
      .slice(-MOST_SWEEPS)
      .map(({ publicId, title }): Evidence => ({ kind: "sweep", id: publicId, text: title })),
    ...said
      .filter(({ note }) => note.removedAt === null)
      .map(({ note, author }): Evidence => {
        const text = `${author?.name ?? "A former member"}: ${plainText(note.body, NOTE_CHARACTERS)}`;
        return { kind: "note", id: note.publicId, text };
      }),
  ].map((one) => ({ ...one, text: one.text.slice(0, MOST_CHARACTERS) }));
}

/** What was chosen, as "kind:id"; what is not there (any more) is left out. */
export function chosenEvidence(keys: readonly string[], offered: readonly Evidence[]): Evidence[] {
  return offered.filter((one) => keys.includes(evidenceKey(one)));
}

export function evidenceKey({ kind, id }: Pick<Evidence, "kind" | "id">): string {
  return `${kind}:${id}`;
}

const MOST_SWEEPS = 60;
const NOTE_CHARACTERS = 120;
const MOST_CHARACTERS = 400;
