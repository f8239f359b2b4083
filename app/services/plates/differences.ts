import type { PlateDip, PlateFigure, PlateRecord, PlateTable, PlateTrace } from "./record.ts";

/** What came out otherwise. */
export interface Difference {
  what: string;
  frozen: string | number | null;
  now: string | number | null;
  /** Why, and by how much where that can be said. */
  why: string;
}

/** Every number of a frozen plate held against those of now; empty where all are the same to the last digit. Pure. */
export function differencesOf(
  frozen: Pick<PlateRecord, "figure" | "tables" | "code" | "sources">,
  now: { figure: PlateFigure; tables: PlateTable[] },
  version: string,
): Difference[] {
  const versions = [...new Set(frozen.sources.flatMap(({ analysisVersion }) => analysisVersion ?? []))];
  const older = versions.filter((one) => one !== version);
  const why =
    older.length > 0
      ? `The method is now version ${version}; this was found by version ${older.join(" and ")}.`
      : "The method bears the same version, so a part of the program that it rests on has changed.";
  const say = (what: string, a: Value, b: Value): Difference[] =>
    a === b ? [] : [{ what, frozen: a, now: b, why: `${byHowMuch(a, b)}${why}` }];
  const found = [
    ...settingsOf(frozen.figure, now.figure, say),
    ...dipsOf(frozen.figure, now.figure, say),
    ...frozen.figure.traces.flatMap((trace) => {
      const other = now.figure.traces.find(({ id }) => id === trace.id);
      return other ? lineOf(trace, other, why) : say(`the line “${trace.label}”`, "drawn", "not there");
    }),
    ...now.figure.traces
      .filter(({ id }) => !frozen.figure.traces.some((trace) => trace.id === id))
      .flatMap(({ label }) => say(`the line “${label}”`, "not there", "drawn")),
  ];
  // Tables are made from the figure: where they alone differ, how they are written has changed.
  if (found.length === 0 && JSON.stringify(frozen.tables) !== JSON.stringify(now.tables)) {
    return say("how the tables write the numbers", "as frozen", "otherwise");
  }
  return found;
}

type Value = string | number | null;
type Say = (what: string, a: Value, b: Value) => Difference[];

function settingsOf(a: PlateFigure, b: PlateFigure, say: Say): Difference[] {
  return [
    ...say("the lower end of the axis, Hz", a.frequency.fromHz, b.frequency.fromHz),
    ...say("the upper end of the axis, Hz", a.frequency.toHz, b.frequency.toHz),
    ...say("the SWR limit", a.swrLimit, b.swrLimit),
    ...say("the reference, Ω", a.referenceOhm, b.referenceOhm),
  ];
}

function dipsOf(a: PlateFigure, b: PlateFigure, say: Say): Difference[] {
  const nameOf = (dip: PlateDip) => `the dip at ${Number((dip.frequencyHz / 1e6).toPrecision(6))} MHz`;
  const gone = a.dips.flatMap((dip): Difference[] => {
    const other = b.dips.find(({ id }) => id === dip.id);
    if (!other) return say(nameOf(dip), "found", "not found");
    return numbersOf(dip).flatMap(([what, value], i) =>
      say(`${nameOf(dip)}: ${what}`, value, numbersOf(other)[i][1]),
    );
  });
  const fresh = b.dips
    .filter(({ id }) => !a.dips.some((dip) => dip.id === id))
    .flatMap((dip) => say(nameOf(dip), "not found", "found"));
  return [...gone, ...fresh];
}

/** Every number of a dip, with its name. */
function numbersOf(dip: PlateDip): [what: string, value: Value][] {
  const { bandwidth: width } = dip;
  return [
    ["frequency, Hz", dip.frequencyHz],
    ["half-width of its interval, Hz", dip.frequencyUncertaintyHz],
    ["lowest SWR", dip.minimumSwr],
    ["lowest SWR at least", dip.minimumSwrLow],
    ["lowest SWR at most", dip.minimumSwrHigh],
    ["return loss, dB", dip.returnLossDb],
    ["return loss at least, dB", dip.returnLossLowDb],
    ["return loss at most, dB", dip.returnLossHighDb],
    ["prominence, dB", dip.prominenceDb],
    ["width, Hz", width?.widthHz ?? null],
    ["width at least, Hz", width?.widthLowHz ?? null],
    ["width at most, Hz", width?.widthHighHz ?? null],
    ["lower edge, Hz", width?.lowHz ?? null],
    ["upper edge, Hz", width?.highHz ?? null],
    ["whether the sweep ends inside", yesNo(width?.open)],
    ["whether the width is shared", yesNo(width?.shared)],
    ["loaded Q", dip.q],
    ["loaded Q at least", dip.qLow],
    ["loaded Q at most", dip.qHigh],
    ["way it was found", dip.method],
    ["whether it is at the end", yesNo(dip.edge)],
    ["whether it is in a design band", yesNo(dip.inDesignBand)],
  ];
}

/** A line is said once, with how many of its points differ and by how much at most. */
function lineOf(a: PlateTrace, b: PlateTrace, why: string): Difference[] {
  const what = `the line “${a.label}”`;
  if (JSON.stringify(a.frequencyHz) !== JSON.stringify(b.frequencyHz)) {
    const [frozen, now] = [`${a.frequencyHz.length} points`, `${b.frequencyHz.length} points`];
    return [{ what: `${what}: its frequencies`, frozen, now, why }];
  }
  const columns: [string, readonly (number | null)[], readonly (number | null)[]][] = [
    ["its values", a.value, b.value],
    ["lower limits", a.limits?.low ?? [], b.limits?.low ?? []],
    ["upper limits", a.limits?.high ?? [], b.limits?.high ?? []],
    ["values as measured", a.measured ?? [], b.measured ?? []],
  ];
  return columns.flatMap(([name, before, after]): Difference[] => {
    const n = Math.max(before.length, after.length);
    const apart = Array.from({ length: n }, (_, i) => i).filter((i) => before[i] !== after[i]);
    if (apart.length === 0) return [];
    const most = Math.max(
      ...apart.map((i) => Math.abs((after[i] ?? Number.NaN) - (before[i] ?? Number.NaN)) || 0),
    );
    const [first] = apart;
    const amount = `${apart.length} of ${n} points differ, by ${Number(most.toPrecision(3))} at most. `;
    return [
      {
        what: `${what}: ${name}`,
        frozen: before[first] ?? null,
        now: after[first] ?? null,
        why: amount + why,
      },
    ];
  });
}

function byHowMuch(a: Value, b: Value): string {
  if (typeof a !== "number" || typeof b !== "number") return "";
  const by = b - a;
  return `${by < 0 ? "−" : "+"}${Number(Math.abs(by).toPrecision(3))}. `;
}

function yesNo(value: boolean | null | undefined): string | null {
  return value === null || value === undefined ? null : value ? "yes" : "no";
}
