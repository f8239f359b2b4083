import type { ProjectAccess } from "~/auth/require.server";
import * as projects from "~/db/projects.server";
import type { FoundSweep } from "~/db/sweeps.server";
import type { Plane } from "~/measurement/sweep";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { bandsOfSweep, targetsOf } from "~/services/bands.server";
import type { ShownDip } from "~/services/shown-dips.server";
import { sweepAt } from "~/services/shown-sweep.server";

/** The bands section: from all the sweep's points at the plane in view, for the dips that are shown. */
export async function loadBands(
  { project, person, may }: ProjectAccess,
  found: FoundSweep,
  shown: { dips: ShownDip[]; plane: Plane | null; limit: number },
) {
  const unit = lengthUnitOf(person);
  const { dips, plane, limit } = shown;
  const designBands = await projects.findDesignBands(project.id);
  const [at, targets] = await Promise.all([
    sweepAt(found, plane),
    targetsOf(found.sweep, dips, designBands, unit),
  ]);
  return {
    project: project.publicId,
    unit,
    region: project.ituRegion,
    limit,
    hasDesignBands: designBands.length > 0,
    mayEditAntenna: may("antenna.edit"),
    bands: at ? bandsOfSweep(at.sweep, dips, project.ituRegion, designBands, limit) : [],
    targets: targets.map(({ dip, band, part, trim, without, targetHz, offsetHz, share, inside }, i) => ({
      id: dip.publicId ?? `tried-${i}`,
      publicId: dip.publicId,
      frequencyHz: dip.frequencyHz,
      frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
      band: band.name,
      targetHz,
      offsetHz,
      share,
      inside,
      part,
      trim,
      without,
    })),
  };
}

export type BandsData = Awaited<ReturnType<typeof loadBands>>;
