import * as cables from "~/db/cables.server";
import * as dips from "~/db/dips.server";
import type { SweepRow } from "~/db/sweeps.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import {
  type Cause,
  causesOf,
  type Discrimination,
  discriminate,
  type NotJudged,
  notJudged,
  type ReferenceDip,
  ripplePeriodOf,
} from "~/measurement/causes";
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
  if (kind === "through") return [];
  const role = kind as ReferenceDip["role"];
  const found = await dips.findAllBySweep(sweep.id);
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
