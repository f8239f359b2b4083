import type { z } from "zod";
import type { BandFigures } from "~/measurement/band-figures";
import type { DipTarget, SweepBand } from "~/services/bands.server";
import type { ComparedRow, ComparedSweep } from "~/services/compare.server";
import type { bandsShape, comparisonShape } from "./compare-schemas.ts";
import { shapeCorrection } from "./shapes.server.ts";

/** Bands and comparisons as the API shows them; JSON knows no Infinity, so that a total reflection has no SWR. */

type Comparison = z.output<typeof comparisonShape>;
type Bands = z.output<typeof bandsShape>;

export function shapeBand(band: SweepBand): Bands["bands"][number] {
  const { name, lowHz, highHz, limitSwr, design } = band;
  return { name, lowHz, highHz, limitSwr, design, ...shapeFigures(band) };
}

export function shapeFigures(figures: BandFigures) {
  const { covered, shareUnder, bestHz } = figures;
  return {
    swrLow: finite(figures.swrLow),
    swrMiddle: finite(figures.swrMiddle),
    swrHigh: finite(figures.swrHigh),
    covered,
    shareUnder,
    bestHz,
    bestSwr: finite(figures.bestSwr),
  };
}

export function shapeTarget(target: DipTarget): Bands["targets"][number] {
  const { dip, band, targetHz, offsetHz, share, inside, part, trim, without } = target;
  return {
    dip: dip.publicId ?? "",
    band: band.name,
    targetHz,
    offsetHz,
    share,
    inside,
    part,
    trim: trim && {
      method: trim.method,
      toM: trim.lengthM,
      lowM: trim.lowM,
      highM: trim.highM,
      changeM: trim.changeM,
      how: trim.how,
    },
    without,
  };
}

export function shapeComparedSweep({
  sweep,
  project,
  analysis,
  at,
}: ComparedSweep): Comparison["sweeps"][number] {
  const { frequencyHz, referenceOhm } = at.sweep;
  const self = `/api/v1/sweeps/${sweep.publicId}`;
  return {
    id: sweep.publicId,
    title: sweep.title,
    project: project.publicId,
    takenAt: sweep.takenAt?.toISOString() ?? null,
    startHz: frequencyHz[0],
    stopHz: frequencyHz[frequencyHz.length - 1],
    points: frequencyHz.length,
    referenceOhm,
    correction: shapeCorrection(analysis?.correction ?? null),
    links: {
      self,
      points: `${self}/points`,
      page: `/projects/${project.publicId}/sweeps/${sweep.publicId}`,
    },
  };
}

export function shapeRow({ cells }: ComparedRow, sweeps: ComparedSweep[]): Comparison["dips"][number] {
  return cells.map(({ dip, movement }, i) => ({
    sweep: sweeps[i].sweep.publicId,
    dip: dip && {
      id: dip.publicId,
      frequencyHz: dip.frequencyHz,
      frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
      minimumSwr: finite(dip.minimumSwr),
      minimumSwrLow: finite(dip.minimumSwrLow),
      minimumSwrHigh: finite(dip.minimumSwrHigh),
      returnLossDb: dip.returnLossDb,
      trail: dip.trail,
    },
    movement: movement && {
      kind: movement.kind,
      byHz: movement.byHz,
      uncertaintyHz: movement.uncertaintyHz,
    },
  }));
}

function finite(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null;
}
