import type { ProjectAccess } from "~/auth/require.server";
import type { DesignBand } from "~/db/projects.server";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { bandsOfSweep, type targetGround, targetsOn } from "~/services/bands.server";
import type { ShownDip } from "~/services/shown-dips.server";
import type { SweepAt } from "~/services/shown-sweep.server";

/** The bands section: from all the sweep's points at the plane in view, for the dips that are shown. */
export function drawBands(
  { project, person, may }: ProjectAccess,
  { at, designBands, ground, dips, limit }: ShownBands,
) {
  const unit = lengthUnitOf(person);
  const targets = targetsOn(ground, dips, designBands, unit);
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

interface ShownBands {
  at: SweepAt | null;
  designBands: DesignBand[];
  ground: Awaited<ReturnType<typeof targetGround>>;
  dips: ShownDip[];
  limit: number;
}

export type BandsData = ReturnType<typeof drawBands>;
