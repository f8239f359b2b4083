import * as antennas from "~/db/antennas.server";
import * as compare from "~/db/compare.server";
import type { DesignBand } from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import type { SweepRow } from "~/db/sweeps.server";
import type { Antenna } from "~/measurement/antenna";
import { type AskedBand, type BandFigures, bandFigures } from "~/measurement/band-figures";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { causesOf } from "~/measurement/causes";
import { type DipOffset, dipOffset } from "~/measurement/dip-offsets";
import type { LengthPair } from "~/measurement/length-line";
import type { LengthUnit } from "~/measurement/lengths";
import type { Dip, Sweep } from "~/measurement/sweep";
import { type Artefacts, artefactsFor, artefactsOf } from "./causes.server.ts";
import { antennaOn, historyOf, lengthsOf } from "./step-expectations.server.ts";

export interface NamedBand extends AskedBand {
  /** One that the antenna was designed for; else an allocation. */
  design: boolean;
  /** Where the edges differ within the region. */
  remark: string | null;
}

export interface SweepBand extends BandFigures, Pick<NamedBand, "design" | "remark"> {}

/** The design bands and the allocations that touch a stretch, design bands first; an allocation of the same edges is said once. */
export function bandsAsked(
  region: number | null,
  designBands: readonly DesignBand[],
  fromHz: number,
  toHz: number,
): NamedBand[] {
  const design = designBands
    .filter(({ lowHz, highHz }) => highHz >= fromHz && lowHz <= toHz)
    .map(({ name, lowHz, highHz, swrLimit }) => ({
      name,
      lowHz,
      highHz,
      swrLimit,
      design: true,
      remark: null,
    }));
  const same = (a: AskedBand) => design.some((b) => a.lowHz === b.lowHz && a.highHz === b.highHz);
  const allocations = bandsOverlapping(region as ItuRegion | null, fromHz, toHz)
    .filter((band) => !same(band))
    .map(({ name, lowHz, highHz, remark }) => ({ name, lowHz, highHz, design: false, remark }));
  return [...design, ...allocations];
}

/** A sweep's figures for every band that it touches. */
export function bandsOfSweep(
  sweep: Sweep,
  dips: readonly Dip[],
  region: number | null,
  designBands: readonly DesignBand[],
  swrLimit: number,
): SweepBand[] {
  const { frequencyHz } = sweep;
  const asked = bandsAsked(region, designBands, frequencyHz[0], frequencyHz[frequencyHz.length - 1]);
  return bandFigures(sweep, asked, dips, swrLimit).map((figures, i) => ({
    ...figures,
    design: asked[i].design,
    remark: asked[i].remark,
  }));
}

type TargetSweep = Pick<SweepRow, "id" | "projectId" | "benchId" | "feedline" | "takenAt" | "createdAt">;

export interface DipTarget extends DipOffset {
  dip: Dip & { publicId: string | null };
  /** Name of the part that the dip may be of and that `trim` is about; null where there is none. */
  part: string | null;
  /** Why there is no trim: too far off to be this band's, the antenna not described for that day, or none of its parts behind the dip. */
  without: "far" | "not-described" | "no-part" | null;
}

/** `targetsOn` with its ground from the database. */
export async function targetsOf(
  sweep: TargetSweep,
  dips: readonly (Dip & { publicId: string | null })[],
  designBands: readonly DesignBand[],
  unit: LengthUnit,
): Promise<DipTarget[]> {
  return targetsOn(await targetGround(sweep), dips, designBands, unit);
}

/** What is known of the antenna's history up to a sweep, from the database: the ground of `targetsOn`. */
export async function targetGround(sweep: TargetSweep) {
  const [versions, sweeps, stops, known, artefacts] = await Promise.all([
    antennas.findAllByProject(sweep.projectId),
    steps.findSweepsInOrder(sweep.projectId),
    steps.findTrailStopsOf(sweep.id),
    compare.findDips([sweep.id]),
    artefactsOf(sweep),
  ]);
  return { sweepId: sweep.id, versions, sweeps, stops, known, artefacts };
}

/**
 * How far each dip lies from its design band, and what to make of the length of the part that may be behind it: the antenna's as it was
 * when the sweep was taken, with the lengths that the dip's trail had seen by then. No trim where the dip is not that band's (TOO_FAR).
 */
export function targetsOn(
  { sweepId, versions, sweeps, stops, known, artefacts }: Awaited<ReturnType<typeof targetGround>>,
  dips: readonly (Dip & { publicId: string | null })[],
  designBands: readonly DesignBand[],
  unit: LengthUnit,
): DipTarget[] {
  const inner = dips.filter(({ edge }) => !edge);
  if (designBands.length === 0) return [];
  const upToHere = sweeps.slice(0, sweeps.findIndex(({ id }) => id === sweepId) + 1);
  const antennaOf = new Map(
    upToHere.map(({ id, takenAt, createdAt }) => [id, antennaOn(versions, takenAt ?? createdAt)]),
  );
  const then = antennaOf.get(sweepId) ?? null;
  return inner.flatMap((dip): DipTarget[] => {
    const offset = dipOffset(dip.frequencyHz, designBands);
    if (!offset) return [];
    const far = Math.abs(offset.share) > TOO_FAR;
    const element = far || !then ? null : partBehind(dip, inner, then, unit, artefacts);
    if (!element) {
      return [{ ...offset, dip, part: null, without: far ? "far" : then ? "no-part" : "not-described" }];
    }
    const trail = known.find(({ publicId }) => publicId === dip.publicId)?.trail ?? null;
    const seen = stops.filter((stop) => stop.trail === trail && antennaOf.has(stop.sweepId));
    const { key, name, kind, lengthM } = element;
    const { frequencyHz, frequencyUncertaintyHz } = dip;
    const pairs: LengthPair[] = historyOf(seen, antennaOf).find(({ part }) => part === key)?.pairs ?? [
      { lengthM, frequencyHz, frequencyUncertaintyHz },
    ];
    const { trim } = dipOffset(frequencyHz, designBands, pairs, { unit, kind }) ?? offset;
    return [{ ...offset, trim, dip, part: name, without: null }];
  });
}

/** The likeliest part of the antenna that may be behind a dip; null where none is among the likely causes, or its length is not said. */
function partBehind(
  dip: Dip,
  dips: readonly Dip[],
  antenna: Antenna,
  unit: LengthUnit,
  artefacts: Artefacts,
) {
  const causes = causesOf(dip, { antenna, dips, unit, ...artefactsFor(dip, antenna, artefacts) });
  const lengths = lengthsOf(antenna);
  const found = causes
    .slice(0, LIKELY)
    .flatMap((cause) => lengths.find(({ part }) => cause.kind === "part" && part === cause.part) ?? [])[0];
  if (!found) return null;
  const element = antenna.elements.find(({ key }) => key === found.part);
  const name = element ? element.name || element.kind : "the feedline";
  return { key: found.part, name, kind: element?.kind ?? null, lengthM: found.lengthM };
}

/** Further off than this a dip is not the band's: what is cut by a third is another antenna. */
const TOO_FAR = 0.33;
/** Of the causes only the likeliest are worth cutting for. */
const LIKELY = 2;
