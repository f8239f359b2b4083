import * as antennas from "~/db/antennas.server";
import * as steps from "~/db/steps.server";
import * as verdictEvents from "~/db/verdict-events.server";
import { type Antenna, type ExpectedPlace, NO_ANTENNA, type StepQuantity } from "~/measurement/antenna";
import { causesOf } from "~/measurement/causes";
import type { LengthUnit } from "~/measurement/lengths";
import { expectedPlaces, type TrailAtStep } from "~/measurement/trim";
import { partOf } from "./cause-keys.ts";
import { resolveQuantities } from "./step-quantities.ts";

type Stop = Awaited<ReturnType<typeof steps.findTrailStops>>[number];
type MovedStop = Awaited<ReturnType<typeof steps.findTrailStopsOf>>[number];

/** Where a planned step should put every trail that the newest sweep shows; empty where nothing of it can be reckoned. */
export async function expectedAfter(
  projectId: number,
  quantities: readonly StepQuantity[],
  unit: LengthUnit,
): Promise<ExpectedPlace[]> {
  const [versions, sweeps, stops, verdicts] = await Promise.all([
    antennas.findAllByProject(projectId),
    steps.findSweepsInOrder(projectId),
    steps.findTrailStops(projectId),
    verdictEvents.findAllOnTrails(projectId),
  ]);
  const now = versions.at(-1)?.version.content ?? null;
  const { quantities: resolved, problem } = resolveQuantities(quantities, now);
  const newest = sweeps.at(-1);
  if (problem || !newest) return [];
  /** The antenna that each sweep was taken of; null where it is not described for that day. */
  const antennaOf = new Map(
    sweeps.map(({ id, takenAt, createdAt }) => [id, antennaOn(versions, takenAt ?? createdAt)]),
  );
  const newestStops = stops.filter(({ sweepId }) => sweepId === newest.id);
  const antenna = now ?? NO_ANTENNA;
  return expectedPlaces(
    newestStops
      .filter(({ numbers }) => !numbers.edge)
      .map((stop): TrailAtStep => {
        const part = agreedPart(stop.trail, verdicts) ?? likeliestPart(stop, newestStops, antenna, unit);
        return {
          trail: stop.trail,
          frequencyHz: stop.numbers.frequencyHz,
          frequencyUncertaintyHz: stop.numbers.frequencyUncertaintyHz,
          part,
          kind: antenna.elements.find(({ key }) => key === part)?.kind ?? null,
          history: historyOf(
            stops.filter(({ trail }) => trail === stop.trail),
            antennaOf,
          ),
        };
      }),
    resolved,
    unit,
  );
}

/** The part whose cause the trail's last verdict rests on; null where that rests on none or was opened again. */
function agreedPart(trail: string, verdicts: Verdicts): string | null {
  const last = verdicts.find((one) => one.trail === trail);
  if (!last || last.verdict === "open") return null;
  const cause = last.evidence.find(({ kind }) => kind === "cause");
  return cause ? partOf(cause.id) : null;
}

type Verdicts = Awaited<ReturnType<typeof verdictEvents.findAllOnTrails>>;

/** The part that may be behind the dip before all others; null where that is none of the antenna's parts. */
function likeliestPart(stop: Stop, all: Stop[], antenna: Antenna, unit: LengthUnit): string | null {
  const dips = all.map(({ numbers }) => numbers);
  const [first] = causesOf(stop.numbers, { antenna, dips, ripplePeriodHz: null, references: [], unit });
  return first?.kind === "part" ? first.part : null;
}

/** What a trail did while the length of a part changed: its frequencies with that part's lengths, oldest sweep first. */
export function historyOf(
  stops: MovedStop[],
  antennaOf: ReadonlyMap<number, Antenna | null>,
): TrailAtStep["history"] {
  const order = [...antennaOf.keys()];
  const inOrder = [...stops].sort((a, b) => order.indexOf(a.sweepId) - order.indexOf(b.sweepId));
  const byPart = new Map<string, TrailAtStep["history"][number]["pairs"]>();
  for (const { sweepId, numbers } of inOrder) {
    const { frequencyHz, frequencyUncertaintyHz, edge } = numbers;
    if (edge) continue;
    for (const { part, lengthM } of lengthsOf(antennaOf.get(sweepId) ?? null)) {
      byPart.set(part, [...(byPart.get(part) ?? []), { lengthM, frequencyHz, frequencyUncertaintyHz }]);
    }
  }
  return [...byPart]
    .filter(([, pairs]) => new Set(pairs.map(({ lengthM }) => lengthM)).size > 1)
    .map(([part, pairs]) => ({ part, pairs }));
}

export function lengthsOf(antenna: Antenna | null): { part: string; lengthM: number }[] {
  if (!antenna) return [];
  const all = [
    ...antenna.elements.map(({ key, lengthM }) => ({ part: key, lengthM })),
    { part: "feedline", lengthM: antenna.feedline?.lengthM ?? null },
  ];
  return all.flatMap(({ part, lengthM }) => (lengthM === null ? [] : [{ part, lengthM }]));
}

export function antennaOn(versions: readonly antennas.ListedVersion[], at: Date): Antenna | null {
  return versions.findLast(({ version }) => version.validFrom <= at)?.version.content ?? null;
}
