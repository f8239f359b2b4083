import type { PlateDip, PlateFigure, PlateTable } from "./record.ts";
import type { PlateKind } from "./subject.ts";

/** The numbers of a figure with their limits, with the digits that these support. Pure: the same figure, the same tables. */
export function tablesOf(kind: PlateKind, figure: PlateFigure): PlateTable[] {
  switch (kind) {
    case "sweep":
      return dipTables("Dips", figure, figure.dips, []);
    case "dip":
      return dipTables(
        "The dip",
        figure,
        figure.dips.filter(({ id }) => id === figure.focus),
        [],
      );
    case "compare":
      return dipTables("Dips side by side", figure, inOrder(figure), ["group", "trace", "moved"]);
    case "trail":
      return dipTables("The trail, sweep by sweep", figure, inOrder(figure), ["trace", "moved"]);
    case "strip":
      return dipTables("Trails, sweep by sweep", figure, inOrder(figure), ["group", "trace", "moved"]);
    case "bench":
      return measureTables(figure);
    default:
      return kind satisfies never;
  }
}

type Extra = "group" | "trace" | "moved";
type Row = PlateTable["rows"][number];

function dipTables(
  title: string,
  figure: PlateFigure,
  dips: readonly PlateDip[],
  extras: readonly Extra[],
): PlateTable[] {
  if (dips.length === 0) return [];
  const limit = `SWR ${Number((figure.swrLimit ?? 2).toFixed(2))}`;
  const columns = [
    ...EXTRA_COLUMNS.filter(({ key }) => extras.includes(key)),
    { key: "frequency", label: "Frequency", unit: "MHz" },
    { key: "frequencyHalf", label: "± (95 %)", unit: "kHz" },
    { key: "swr", label: "Lowest SWR", unit: "" },
    { key: "swrLow", label: "SWR at least", unit: "" },
    { key: "swrHigh", label: "SWR at most", unit: "" },
    { key: "returnLoss", label: "Return loss", unit: "dB" },
    { key: "returnLossLow", label: "Return loss at least", unit: "dB" },
    { key: "returnLossHigh", label: "Return loss at most", unit: "dB" },
    { key: "width", label: `Width under ${limit}`, unit: "kHz" },
    { key: "widthLow", label: "Width at least", unit: "kHz" },
    { key: "widthHigh", label: "Width at most", unit: "kHz" },
    { key: "widthRemark", label: "On the width", unit: "" },
    { key: "q", label: "Loaded Q", unit: "" },
    { key: "verdict", label: "Explanation", unit: "" },
  ];
  const rows = dips.map((dip, i) => ({ ...extraCells(figure, dips, i, extras), ...dipCells(dip) }));
  return [{ title, columns, rows }];
}

const EXTRA_COLUMNS: { key: Extra; label: string; unit: string }[] = [
  { key: "group", label: "Dip", unit: "" },
  { key: "trace", label: "Sweep", unit: "" },
  { key: "moved", label: "Moved", unit: "kHz" },
];

function extraCells(
  figure: PlateFigure,
  dips: readonly PlateDip[],
  i: number,
  extras: readonly Extra[],
): Row {
  const dip = dips[i];
  const trail = trailOf(figure, dip);
  const before = dips[i - 1];
  const same = before && trail && trailOf(figure, before) === trail;
  // In a comparison all are against the first one; along a trail each is against the one before.
  const from =
    figure.form === "curves" && trail ? dips.find((one) => trailOf(figure, one) === trail) : before;
  const moved = same && from ? (dip.frequencyHz - from.frequencyHz) / 1e3 : null;
  const half = from && sum(dip.frequencyUncertaintyHz, from.frequencyUncertaintyHz);
  const cells = {
    group: trail?.label ?? "on no trail",
    trace: figure.traces.find(({ id }) => id === dip.trace)?.label ?? "",
    moved: same ? rounded(moved, half ? half / 1e3 : null, 4) : "first",
  };
  return Object.fromEntries(extras.map((extra) => [extra, cells[extra]]));
}

function dipCells(dip: PlateDip): Row {
  const { bandwidth, frequencyUncertaintyHz: halfHz } = dip;
  const swr = (value: number | null) => (value === null ? null : round(value, value < 10 ? 2 : 1));
  const kilo = (hz: number | null | undefined) => (hz == null ? null : Number((hz / 1e3).toPrecision(4)));
  return {
    frequency: rounded(dip.frequencyHz / 1e6, halfHz && halfHz / 1e6, 7),
    frequencyHalf: halfHz === null ? null : Number((halfHz / 1e3).toPrecision(2)),
    swr: dip.minimumSwr === null ? "∞" : swr(dip.minimumSwr),
    swrLow: swr(dip.minimumSwrLow),
    // A lower limit without an upper one: the upper one is beyond every number.
    swrHigh: dip.minimumSwrHigh === null && dip.minimumSwrLow !== null ? "∞" : swr(dip.minimumSwrHigh),
    returnLoss: round(dip.returnLossDb, 1),
    returnLossLow: dip.returnLossLowDb === null ? null : round(dip.returnLossLowDb, 1),
    returnLossHigh: dip.returnLossHighDb === null ? null : round(dip.returnLossHighDb, 1),
    width: bandwidth ? kilo(bandwidth.widthHz) : "none",
    widthLow: bandwidth ? kilo(bandwidth.widthLowHz) : "none",
    widthHigh: bandwidth ? kilo(bandwidth.widthHighHz) : "none",
    widthRemark:
      [
        bandwidth?.open && "at least: the sweep ends inside",
        bandwidth?.shared && "shared with another dip",
        dip.edge && "the dip is at the end of the sweep",
      ]
        .filter(Boolean)
        .join("; ") || "none",
    q: dip.q === null ? null : Number(dip.q.toPrecision(3)),
    verdict: dip.verdict || "open",
  };
}

/** Along each trail in the order of the traces; what is on none stays out, but in a comparison comes last. */
function inOrder(figure: PlateFigure): PlateDip[] {
  const dipOf = new Map(figure.dips.map((dip) => [dip.id, dip]));
  const order = new Map(figure.traces.map(({ id }, i) => [id, i]));
  const rank = ({ trace }: { trace: string }) => order.get(trace) ?? 0;
  const on = figure.trails.flatMap(({ stops }) =>
    [...stops].sort((a, b) => rank(a) - rank(b)).flatMap(({ dip }) => dipOf.get(dip) ?? []),
  );
  const rest = figure.form === "curves" ? figure.dips.filter((dip) => !dip.edge && !on.includes(dip)) : [];
  return [...on, ...rest];
}

function trailOf({ trails }: PlateFigure, { id }: PlateDip) {
  return trails.find(({ stops }) => stops.some(({ dip }) => dip === id));
}

/** Each measure at a handful of the drawn frequencies, from end to end. */
function measureTables({ traces }: PlateFigure): PlateTable[] {
  const first = traces[0];
  if (!first) return [];
  const n = first.frequencyHz.length;
  const picked = new Set(
    Array.from({ length: Math.min(n, MEASURE_ROWS) }, (_, i) =>
      n <= MEASURE_ROWS ? i : Math.round((i * (n - 1)) / (MEASURE_ROWS - 1)),
    ),
  );
  const rows = [...picked].map((i) => {
    const hz = first.frequencyHz[i];
    const values = traces.map((trace) => [trace.id, at(trace, hz)] as const);
    return { frequency: Number((hz / 1e6).toPrecision(6)), ...Object.fromEntries(values) };
  });
  const columns = traces.map(({ id, label }) => ({ key: id, label, unit: "dB" }));
  return [
    {
      title: "What the bench can do",
      columns: [{ key: "frequency", label: "Frequency", unit: "MHz" }, ...columns],
      rows,
    },
  ];
}

/** The drawn point next to a frequency: the measures share one grid, of which each keeps its own points. */
function at({ frequencyHz, value }: PlateFigure["traces"][number], hz: number): number | null {
  let best = 0;
  for (let i = 1; i < frequencyHz.length; i++) {
    if (Math.abs(frequencyHz[i] - hz) < Math.abs(frequencyHz[best] - hz)) best = i;
  }
  const found = value[best];
  return found === null ? null : round(found, 1);
}

/** With the decimals down to the first digit of the half-width; without one with so many digits. */
function rounded(value: number | null, half: number | null, digits: number): number | null {
  if (value === null) return null;
  if (half === null || !(half > 0)) return Number(value.toPrecision(digits));
  return round(
    value,
    Math.min(9, Math.max(0, -Math.floor(Math.log10(Math.max(half, Math.abs(value) * 1e-6))))),
  );
}

function round(value: number, decimals: number): number {
  return Number(value.toFixed(decimals));
}

function sum(a: number | null, b: number | null): number | null {
  return a === null || b === null ? null : Math.hypot(a, b);
}

const MEASURE_ROWS = 13;
