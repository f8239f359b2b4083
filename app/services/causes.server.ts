import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import * as cables from "~/db/cables.server";
import * as dips from "~/db/dips.server";
import type { SweepRow } from "~/db/sweeps.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { causesOf } from "~/measurement/causes";
import type { Cause, ReferenceDip } from "~/measurement/causes/cause";
import { type Discrimination, discriminate } from "~/measurement/causes/discriminate";
import { ripplePeriodOf } from "~/measurement/causes/ripple";
import { type NotJudged, notJudged } from "~/measurement/elements";
import type { LengthUnit } from "~/measurement/lengths";
import type { Dip } from "~/measurement/sweep";
import { type AntennaThen, antennaAt } from "./antennas.server.ts";
import { benchForSweep } from "./bench-sweeps.server.ts";
import { keyOf } from "./cause-keys.ts";

export interface NamedCause extends Cause {
  /** Stays the same while the antenna has the part: "part.a1b2.3". */
  key: string;
}

export interface Judgement {
  /** Likeliest first. */
  causes: NamedCause[];
  /** Changes that tell them apart, the best first. */
  tests: Discrimination[];
  notJudged: NotJudged[];
  /** The antenna as it was when the sweep was taken. */
  then: AntennaThen;
  /** VF·c/(2l), Hz; null where the feedline's length or velocity factor is not said. */
  ripplePeriodHz: number | null;
  /** The bench whose own sweeps were looked through; null without one. */
  bench: { name: string; kinds: string[] } | null;
}

/** What may be behind a dip: from the antenna of that day, the sweep's other dips, its feedline and its bench. */
export async function judgeDip(
  dip: Pick<dips.DipRow, "numbers">,
  sweep: Pick<SweepRow, "id" | "projectId" | "benchId" | "feedline" | "takenAt" | "createdAt">,
  unit: LengthUnit,
): Promise<Judgement> {
  const [then, known, used, own] = await Promise.all([
    antennaAt(sweep.projectId, sweep.takenAt ?? sweep.createdAt),
    dips.findAllBySweep(sweep.id),
    benchForSweep(sweep),
    cables.findAllByProject(sweep.projectId),
  ]);
  const antenna = then.kind === "described" ? then.version.content : NO_ANTENNA;
  const references = used?.kind === "bench" ? used.references : [];
  const context = {
    antenna,
    unit,
    dips: known.filter((one) => one.dip.present).map((one) => one.dip.numbers),
    ripplePeriodHz: rippleOf(sweep, antenna, own),
    references: (await Promise.all(references.map((one) => dipsOf(one, dip.numbers)))).flat(),
  };
  const causes = causesOf(dip.numbers, context);
  return {
    causes: causes.map((cause) => ({ ...cause, key: keyOf(cause) })),
    tests: discriminate(causes.slice(0, COMPARED), unit).slice(0, TESTS),
    notJudged: then.kind === "described" ? notJudged(antenna) : [],
    then,
    ripplePeriodHz: context.ripplePeriodHz,
    bench:
      used?.kind === "bench" ? { name: used.bench.name, kinds: references.map(({ kind }) => kind) } : null,
  };
}

/** What may be of the set-up in a sweep and not of the antenna, as far as it is known before a dip is looked at. */
export interface Artefacts {
  sweep: Pick<SweepRow, "feedline">;
  cables: cables.CableRow[];
  /** Of the bench as it was when the sweep was taken. */
  references: { kind: string; dips: dips.ListedDip[] }[];
}

export async function artefactsOf(
  sweep: Pick<SweepRow, "projectId" | "benchId" | "feedline" | "takenAt" | "createdAt">,
): Promise<Artefacts> {
  const [own, references] = await Promise.all([
    cables.findAllByProject(sweep.projectId),
    referencesOf(sweep),
  ]);
  const known = await Promise.all(references.map((one) => dips.findAllBySweep(one.sweep.id)));
  return {
    sweep,
    cables: own,
    references: references.map(({ kind }, i) => ({ kind, dips: known[i] })),
  };
}

/** The artefacts as far as they bear on one dip, for `causesOf`. */
export function artefactsFor(judged: Dip, antenna: Antenna, { sweep, cables: own, references }: Artefacts) {
  return {
    ripplePeriodHz: rippleOf(sweep, antenna, own),
    references: references.flatMap(({ kind, dips: found }) => largeEnough(kind, found, judged)),
  };
}

/** The reference sweeps that are read, without their points. */
async function referencesOf({
  benchId,
  takenAt,
  createdAt,
}: Pick<SweepRow, "benchId" | "takenAt" | "createdAt">) {
  if (benchId === null) return [];
  const version = await benches.findVersionAt(benchId, takenAt ?? createdAt);
  const found = version ? await benchReferences.findAllByVersions([version.id]) : [];
  return found.filter(({ sweep }) => sweep.readingId !== null && sweep.problem === null);
}

/** The line that the sweep says it was seen through, else the antenna's. */
function rippleOf(sweep: Pick<SweepRow, "feedline">, { feedline }: Antenna, own: cables.CableRow[]) {
  if (sweep.feedline) return ripplePeriodOf({ ...sweep.feedline, cable: null });
  const entry = own.find(({ name }) => name === feedline?.cable);
  return ripplePeriodOf(
    feedline && { ...feedline, velocityFactor: feedline.velocityFactor ?? entry?.velocityFactor ?? null },
  );
}

/** Dips of a reference sweep that are large enough to show beside this one. */
async function dipsOf(
  { kind, sweep }: { kind: string; sweep: { id: number } },
  judged: Dip,
): Promise<ReferenceDip[]> {
  return kind === "through" ? [] : largeEnough(kind, await dips.findAllBySweep(sweep.id), judged);
}

function largeEnough(kind: string, found: dips.ListedDip[], judged: Dip): ReferenceDip[] {
  if (kind === "through") return [];
  const role = kind as ReferenceDip["role"];
  return found
    .filter(
      ({ dip }) => dip.present && !dip.numbers.edge && crestOf(dip.numbers) <= crestOf(judged) + UNDER_DB,
    )
    .map(({ dip: { numbers } }) => ({
      role,
      frequencyHz: numbers.frequencyHz,
      frequencyUncertaintyHz: numbers.frequencyUncertaintyHz,
    }));
}

/** Return loss beside a dip, dB. */
function crestOf({ returnLossDb, prominenceDb }: Dip): number {
  return returnLossDb - prominenceDb;
}

/** Of a good load everything lies far down, and its nulls are no dips that an antenna's sweep could show: a tenth in abs Γ. */
const UNDER_DB = 20;
/** Causes that are told apart from one another, and the changes that are named. */
const COMPARED = 4;
const TESTS = 3;
