import type { ProjectAccess } from "~/auth/require.server";
import * as cables from "~/db/cables.server";
import type { FoundSweep } from "~/db/sweeps.server";
import type { AntennaFeedline } from "~/measurement/antenna";
import { CABLES, cableNamed } from "~/measurement/cables";
import type { Plane } from "~/measurement/sweep";
import { antennaAt } from "~/services/antennas.server";
import { usableBenches } from "~/services/bench-sweeps.server";
import type { SweepAt } from "~/services/shown-sweep.server";
import { changedSince, type Means, meansOf } from "~/services/sweep-corrections.server";
import { benchOptions } from "./bench-options";
import { correctionWords, PLANE_WORDS, planeWords } from "./correction-words";
import { type FeedlineFields, OWN } from "./feedline.schema";
import { PLANES } from "./sweeps.schema";

/** What the sweep page says of the plane that it shows, and what can be chosen. */
export async function loadCorrection(
  access: ProjectAccess,
  found: FoundSweep,
  tried: Plane | null,
  shownAt: Promise<SweepAt | null>,
) {
  const { sweep, analysis } = found;
  const stored = analysis?.correction ?? null;
  const storedPlane = stored?.plane ?? "instrument";
  const edit = access.may("sweep.edit");
  const [at, now, antenna, benches, own] = await Promise.all([
    shownAt,
    meansOf(sweep),
    edit && !sweep.feedline ? antennaAt(access.project.id, sweep.takenAt ?? sweep.createdAt) : null,
    edit ? usableBenches(access.project.id) : [],
    edit ? cables.findAllByProject(access.project.id) : [],
  ]);
  const changed = changedSince(stored, now);
  const shown = tried ? (at?.correction ?? null) : stored;
  return {
    /** The switch that is down: what was asked for, else what is kept. */
    plane: tried ?? storedPlane,
    storedPlane,
    words: correctionWords(shown),
    short: planeWords(shown),
    problem: changed ? null : (at?.means.problem ?? now.problem),
    changed,
    grey: false,
    planes: PLANES.map((plane) => ({
      plane,
      word: PLANE_WORDS[plane],
      missing: plane === storedPlane ? null : missingFor(plane, now, sweep.benchId !== null),
    })),
    /** The bench that was said, also where it can't be used. */
    bench: now.named && { publicId: now.named.publicId, name: now.named.name },
    feedline: sweep.feedline ?? null,
    proposal: antenna?.kind === "described" ? proposalOf(antenna.version.content.feedline, own) : null,
    choices: edit
      ? {
          benches: benchOptions(benches, access.project.publicId),
          cables: CABLES.map(({ name, velocityFactor }) => ({ name, velocityFactor })),
          own: own.map(({ publicId, name, velocityFactor }) => ({ publicId, name, velocityFactor })),
        }
      : null,
  };
}

export type CorrectionData = Awaited<ReturnType<typeof loadCorrection>>;

/** The antenna's own feedline as the form's beginning; null where its cable or length is not said. */
function proposalOf(line: AntennaFeedline | null, own: cables.CableRow[]): FeedlineFields | null {
  if (!line?.cable || line.lengthM === null) return null;
  const mine = own.find(({ name }) => name === line.cable);
  const cable = mine ? OWN + mine.publicId : cableNamed(line.cable)?.name;
  if (!cable) return null;
  const velocityFactor = line.velocityFactor === null ? "" : String(line.velocityFactor);
  return { cable, lengthM: String(line.lengthM), velocityFactor, k1: "", k2: "" };
}

/** What stands in the way of a plane; null where it can be shown. */
function missingFor(plane: Plane, now: Means, named: boolean): string | null {
  if (plane === "antenna") return now.feedline ? null : "the feedline between port and antenna";
  if (plane === "instrument" || now.bench) return null;
  return named ? "references of the bench for the day of this sweep" : "the bench that it was taken with";
}
