import type { z } from "zod";
import type * as benchReferences from "~/db/bench-references.server";
import type * as benches from "~/db/benches.server";
import type * as steps from "~/db/steps.server";
import type * as trailStops from "~/db/trail-stops.server";
import type * as trails from "~/db/trails.server";
import { sweepsAround } from "~/services/step-sweeps";
import type * as shapes from "./story-schemas.ts";

/** Rows of the experiment's story as the API shows them. */

export function shapeStep(
  { step, by }: Pick<steps.ListedStep, "step" | "by">,
  ordered: readonly steps.OrderedSweep[],
  project: string,
): z.output<typeof shapes.stepShape> {
  const { before, after } = sweepsAround(step, ordered);
  return {
    id: step.publicId,
    title: step.title,
    body: step.body,
    state: step.state,
    at: step.at?.toISOString() ?? null,
    by,
    quantities: step.quantities,
    before: before?.publicId ?? null,
    after: after?.publicId ?? null,
    expected: step.expected,
    links: {
      self: `/api/v1/steps/${step.publicId}`,
      page: `/projects/${project}/steps/${step.publicId}`,
    },
  };
}

type Stop = Awaited<ReturnType<typeof trailStops.findAllByProject>>[number];

export function shapeTrail(
  trail: trails.TrailRow,
  stops: readonly Omit<Stop, "trailId">[],
  project: string,
): z.output<typeof shapes.trailShape> {
  return {
    id: trail.publicId,
    name: trail.name,
    frequencyHz: trail.frequencyHz,
    verdict: trail.verdict,
    verdictText: trail.verdictText,
    dips: stops.map((stop) => ({
      id: stop.publicId,
      sweep: stop.sweepPublicId,
      takenAt: stop.at?.toISOString() ?? null,
      frequencyHz: stop.frequencyHz,
      frequencyUncertaintyHz: stop.frequencyUncertaintyHz,
      minimumSwr: stop.minimumSwr,
      minimumSwrLow: stop.minimumSwrLow,
      minimumSwrHigh: stop.minimumSwrHigh,
    })),
    links: { page: `/projects/${project}/trails/${trail.publicId}` },
  };
}

export function shapeBench(
  { bench, owner }: benches.ListedBench,
  versions: readonly benches.ListedVersion[],
  references: readonly benchReferences.FoundReference[],
  project: string,
): z.output<typeof shapes.benchShape> {
  return {
    id: bench.publicId,
    name: bench.name,
    description: bench.description,
    owner,
    retired: bench.retiredAt !== null,
    versions: versions.map(({ version: { id, number, validFrom, remark } }) => ({
      number,
      validFrom: validFrom.toISOString(),
      remark,
      references: references
        .filter(({ versionId }) => versionId === id)
        .map(({ kind, sweep, sha256 }) => ({
          kind,
          sweep: sweep.publicId,
          sha256,
          read: sweep.readingId !== null && sweep.problem === null,
        })),
    })),
    links: { page: `/projects/${project}/benches/${bench.publicId}` },
  };
}
