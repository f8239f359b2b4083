import { packPoints, type SentPoints } from "~/charts/sent-points";
import * as dips from "~/db/dips.server";
import type * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import type { ExpectedPlace } from "~/measurement/antenna";
import { decimate } from "~/measurement/decimate";
import { differenceOf } from "~/measurement/difference";
import { type Movement, movementsBetween } from "~/measurement/movement";
import type { Dip, Sweep } from "~/measurement/sweep";
import { pickPoints } from "./points.server.ts";
import { sweepAt } from "./shown-sweep.server.ts";
import { type Around, sweepsAround } from "./step-sweeps.ts";

/** A dip in a step's story. */
export interface StepDip extends Dip {
  publicId: string;
  /** Public id of its trail; null where it is on none. */
  trail: string | null;
}

export interface StepSide {
  publicId: string;
  title: string;
  takenAt: Date | null;
  startHz: number;
  stopHz: number;
  points: SentPoints;
  /** In words, how it was corrected; null as measured. */
  plane: string;
}

export interface ExpectedAgainst extends ExpectedPlace {
  /** The trail's name; empty where nobody gave one. */
  name: string;
  /** Where its dip lay before; null where the sweep before shows none on it. */
  was: ExpectedAgainst["came"];
  /** Where the trail's dip came; null where the later sweep shows none on it, or there is no later sweep. */
  came: { publicId: string; frequencyHz: number; frequencyUncertaintyHz: number | null } | null;
}

export interface StepEffect {
  around: Around<steps.OrderedSweep>;
  before: StepSide | null;
  after: StepSide | null;
  movements: Movement<StepDip>[];
  /** dB of return loss, after less before, thinned for a drawing; null without both. */
  difference: { frequencyHz: number[]; db: number[] } | null;
  expected: ExpectedAgainst[];
}

/** What a step did: the sweeps beside it, how far each dip moved, and what was expected against what came. */
export async function loadEffect(
  projectId: number,
  step: steps.StepRow,
  ordered: readonly steps.OrderedSweep[],
  range?: { fromHz: number; toHz: number },
): Promise<StepEffect> {
  const around = sweepsAround(step, ordered);
  const [before, after, members, named] = await Promise.all([
    loadSide(around.before),
    loadSide(around.after),
    trails.findMembers(projectId),
    trails.findAllByProject(projectId),
  ]);
  const idOf = new Map(named.map(({ id, publicId }) => [id, publicId]));
  const trailOf = new Map(members.map(({ dipId, trailId }) => [dipId, idOf.get(trailId) ?? null]));
  const [old, fresh] = [before, after].map((side) => side && withTrails(side, trailOf));
  return {
    around,
    before: before && shownSide(before, range),
    after: after && shownSide(after, range),
    movements: old && fresh ? movementsBetween(old, fresh, ({ trail }) => trail) : [],
    difference: before && after ? thinned(differenceOf(before.sweep, after.sweep), range) : null,
    expected: step.expected.map((place) => ({
      ...place,
      name: named.find(({ publicId }) => publicId === place.trail)?.name ?? "",
      was: dipOn(place.trail, old),
      came: dipOn(place.trail, fresh),
    })),
  };
}

function dipOn(trail: string, side: { dips: StepDip[] } | null): ExpectedAgainst["came"] {
  const dip = side?.dips.find((one) => one.trail === trail && !one.edge);
  if (!dip) return null;
  const { publicId, frequencyHz, frequencyUncertaintyHz } = dip;
  return { publicId, frequencyHz, frequencyUncertaintyHz };
}

interface LoadedSide {
  found: sweeps.FoundSweep;
  sweep: Sweep;
  rows: dips.ListedDip[];
}

async function loadSide(at: steps.OrderedSweep | null): Promise<LoadedSide | null> {
  if (!at) return null;
  const [found, rows] = await Promise.all([sweeps.findByPublicId(at.publicId), dips.findAllBySweep(at.id)]);
  const shown = found && (await sweepAt(found));
  return found && shown ? { found, sweep: shown.sweep, rows } : null;
}

function withTrails({ found, rows }: LoadedSide, trailOf: ReadonlyMap<number, string | null>) {
  return {
    startHz: found.sweep.startHz ?? Number.NaN,
    stopHz: found.sweep.stopHz ?? Number.NaN,
    dips: rows
      .filter(({ dip }) => dip.present)
      .map(
        ({ dip }): StepDip => ({
          ...dip.numbers,
          publicId: dip.publicId,
          trail: trailOf.get(dip.id) ?? null,
        }),
      ),
  };
}

function shownSide({ found, sweep }: LoadedSide, range?: { fromHz: number; toHz: number }): StepSide {
  return {
    publicId: found.sweep.publicId,
    title: found.sweep.title,
    takenAt: found.sweep.takenAt,
    startHz: sweep.frequencyHz[0],
    stopHz: sweep.frequencyHz[sweep.frequencyHz.length - 1],
    points: packPoints(pickPoints(sweep, decimate(sweep, CHART_POINTS, range))),
    plane: PLANE_WORDS[sweep.plane],
  };
}

/** In each of many columns the lowest and the highest, so that no spike is lost; NaN becomes a gap by being left in. */
function thinned(
  { frequencyHz, db }: ReturnType<typeof differenceOf>,
  range = { fromHz: frequencyHz[0] ?? 0, toHz: frequencyHz[frequencyHz.length - 1] ?? 0 },
) {
  const inside = [...frequencyHz.keys()].filter(
    (i) => frequencyHz[i] >= range.fromHz && frequencyHz[i] <= range.toHz,
  );
  const size = Math.max(1, Math.ceil(inside.length / DIFFERENCE_COLUMNS));
  const kept: number[] = [];
  for (let at = 0; at < inside.length; at += size) {
    const column = inside.slice(at, at + size);
    const known = column.filter((i) => !Number.isNaN(db[i]));
    const by = (sign: number) =>
      known.reduce((best, i) => (sign * db[i] < sign * db[best] ? i : best), known[0]);
    kept.push(...new Set(known.length > 0 ? [by(1), by(-1)].sort((a, b) => a - b) : column.slice(0, 1)));
  }
  return {
    frequencyHz: kept.map((i) => frequencyHz[i]),
    db: kept.map((i) => Math.round(db[i] * 1000) / 1000),
  };
}

const PLANE_WORDS = {
  instrument: "as measured",
  port: "corrected at the bench's port",
  antenna: "at the antenna",
} as const;
const CHART_POINTS = 1600;
const DIFFERENCE_COLUMNS = 500;
