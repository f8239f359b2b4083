import * as antennas from "~/db/antennas.server";
import type * as dips from "~/db/dips.server";
import type { DesignBand } from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import type { ElementKind } from "~/measurement/antenna";
import { type DipOffset, dipOffset } from "~/measurement/dip-offsets";
import type { LengthPair } from "~/measurement/length-line";
import type { LengthUnit } from "~/measurement/lengths";
import type { Trim } from "~/measurement/trim";
import type { Judgement } from "./causes.server.ts";
import { antennaOn, historyOf, lengthsOf } from "./step-expectations.server.ts";

export interface TrimAdvice {
  /** The part that is cut, as a step points at it. */
  part: string;
  name: string;
  /** What the part is now, metres. */
  lengthM: number;
  trim: Trim;
  /** How many of its lengths the trail has seen. */
  lengthsSeen: number;
  /** The part is not now what it was when the dip was swept: then this is advice from then. */
  changedSince: boolean;
}

export interface Advice {
  offset: Omit<DipOffset, "trim">;
  /** For every part that may be behind the dip, the likeliest first. */
  trims: TrimAdvice[];
}

/**
 * How to bring a dip to the design band that is nearest: for each of the antenna's parts that may be behind it, by the line through
 * the lengths that its trail has seen up to this sweep, or by proportion. Null without design bands; no trims where the dip lies so far
 * off that it is not that band's, nor for parts whose length is not said.
 */
export async function adviseOn(
  dip: Pick<dips.DipRow, "projectId" | "sweepId" | "numbers">,
  trail: string | null,
  { causes }: Pick<Judgement, "causes">,
  bands: readonly DesignBand[],
  unit: LengthUnit,
): Promise<Advice | null> {
  const { frequencyHz, frequencyUncertaintyHz } = dip.numbers;
  const found = dipOffset(frequencyHz, bands);
  if (!found) return null;
  const { trim: _, ...offset } = found;
  if (Math.abs(offset.share) > TOO_FAR) return { offset, trims: [] };
  const [versions, sweeps, stops] = await Promise.all([
    antennas.findAllByProject(dip.projectId),
    steps.findSweepsInOrder(dip.projectId),
    trail === null ? [] : steps.findTrailStops(dip.projectId),
  ]);
  const upToHere = sweeps.slice(0, sweeps.findIndex(({ id }) => id === dip.sweepId) + 1);
  const antennaOf = new Map(
    upToHere.map(({ id, takenAt, createdAt }) => [id, antennaOn(versions, takenAt ?? createdAt)]),
  );
  const then = antennaOf.get(dip.sweepId) ?? null;
  const now = versions.at(-1)?.version.content ?? null;
  const history = historyOf(
    stops.filter((stop) => stop.trail === trail && antennaOf.has(stop.sweepId)),
    antennaOf,
  );
  const trims = lengthsOf(then).flatMap(({ part, lengthM }): (TrimAdvice & { rank: number })[] => {
    const rank = causes.findIndex((cause) => cause.kind === "part" && cause.part === part);
    if (rank < 0 || rank >= LIKELY) return [];
    const element = then?.elements.find(({ key }) => key === part);
    const pairs: LengthPair[] = history.find((one) => one.part === part)?.pairs ?? [
      { lengthM, frequencyHz, frequencyUncertaintyHz },
    ];
    const kind: ElementKind | null = element?.kind ?? null;
    const trim = dipOffset(frequencyHz, bands, pairs, { unit, kind })?.trim;
    if (!trim) return [];
    const lengthNow = lengthsOf(now).find((one) => one.part === part)?.lengthM ?? null;
    const lengthsSeen = new Set(pairs.map((pair) => pair.lengthM)).size;
    const name = element ? element.name || element.kind : "the feedline";
    return [{ part, name, lengthM, trim, lengthsSeen, changedSince: lengthNow !== lengthM, rank }];
  });
  trims.sort((a, b) => a.rank - b.rank);
  return { offset, trims: trims.map(({ rank: _, ...trim }) => trim) };
}

/** Further off than this a dip is not the band's: what is cut by a third is another antenna. */
const TOO_FAR = 0.33;
/** Of the causes only the likeliest are worth cutting for. */
const LIKELY = 2;
