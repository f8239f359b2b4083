import { qualifyBench } from "../../measurement/correction/qualify.ts";
import { decimate } from "../../measurement/decimate.ts";
import { pointLimits } from "../../measurement/limits/point-limits.ts";
import { noiseOf } from "../../measurement/noise.ts";
import { closeUpRange } from "../close-up.ts";
import { BENCH_MEASURES, MOST_DB } from "./bench-measures.ts";
import type { Material, MaterialDip, MaterialSweep } from "./material.ts";
import type { PlateDip, PlateFigure, PlateTrace } from "./record.ts";

/** The figure of a plate, complete: the same material gives the same figure, to the last digit. Pure. */
export function figureOf(material: Material): PlateFigure {
  const { kind, choices, sweeps } = material;
  const { showBands: bands, showDips: dips, showLimits: limits, showTitle: title } = choices;
  const quality = material.bench && qualifyBench(material.bench.correction, material.bench.wish);
  const range = rangeOf(material, quality?.frequencyHz);
  const columns = kind === "strip" || kind === "trail" ? STRIP_POINTS : CURVE_POINTS;
  const log = choices.scale === "log" && range.fromHz > 0;
  return {
    form: quality ? "measures" : kind === "strip" || kind === "trail" ? "strips" : "curves",
    frequency: { ...range, scale: log ? "log" : "linear" },
    quantity: quality ? "decibels" : choices.quantity,
    swrLimit: sweeps[0]?.swrLimit ?? null,
    referenceOhm: oneOf(sweeps.map(({ points }) => points.referenceOhm)),
    bands: material.bands.filter(
      ({ lowHz, highHz, design }) => design || (highHz >= range.fromHz && lowHz <= range.toHz),
    ),
    traces: quality
      ? BENCH_MEASURES.flatMap(({ key, title: label, hint }) =>
          measureTrace({ id: key, label, caption: hint }, quality.frequencyHz, quality[key], range, log),
        )
      : sweeps.map((sweep) => traceOf(sweep, range, columns, log, columns === CURVE_POINTS)),
    dips: sweeps.flatMap((sweep) =>
      sweep.dips
        .filter(({ frequencyHz: hz }) => hz >= range.fromHz && hz <= range.toHz)
        .map((dip) => dipOf(dip, sweep.id, material.bands)),
    ),
    focus: material.focus,
    trails: material.trails,
    steps: material.steps,
    show: { bands, dips, limits, title },
  };
}

/** The whole of what there is, a dip's close-up, or what was chosen of it. */
function rangeOf({ kind, choices, sweeps, focus }: Material, benchHz?: Float64Array) {
  const grids = benchHz ? [benchHz] : sweeps.map(({ points }) => points.frequencyHz);
  const filled = grids.filter(({ length }) => length > 0);
  let fromHz = Math.min(...filled.map((hz) => hz[0]));
  let toHz = Math.max(...filled.map((hz) => hz[hz.length - 1]));
  const dip = kind === "dip" ? sweeps[0]?.dips.find(({ id }) => id === focus) : undefined;
  if (dip) ({ fromHz, toHz } = closeUpRange(dip, sweeps[0].points));
  const chosen = { fromHz: choices.fromHz ?? fromHz, toHz: choices.toHz ?? toHz };
  return chosen.fromHz < chosen.toHz ? chosen : { fromHz, toHz };
}

function traceOf(
  { id, label, caption, points, measured }: MaterialSweep,
  range: { fromHz: number; toHz: number },
  most: number,
  log: boolean,
  withLimits: boolean,
): PlateTrace {
  const kept = decimate(points, most, range, log);
  const grey = measured && decimate({ ...points, magnitude: Float64Array.from(measured) }, most, range, log);
  const indices = grey ? Uint32Array.from(new Set([...kept, ...grey])).sort() : kept;
  const pick = (values: ArrayLike<number>) => Array.from(indices, (i) => seven(values[i]));
  const limits = withLimits ? pointLimits(points, noiseOf(points.magnitude)) : { known: false as const };
  return {
    id,
    label,
    caption,
    frequencyHz: Array.from(indices, (i) => points.frequencyHz[i]),
    value: pick(points.magnitude),
    limits: limits.known ? { low: pick(limits.low), high: pick(limits.high) } : null,
    measured: measured && pick(measured),
  };
}

/** Nothing for a measure that the bench does not know. */
function measureTrace(
  what: Pick<PlateTrace, "id" | "label" | "caption">,
  frequencyHz: Float64Array,
  values: Float64Array,
  range: { fromHz: number; toHz: number },
  log: boolean,
): PlateTrace[] {
  if (values.every(Number.isNaN)) return [];
  const bounded = values.map((v) => (Number.isNaN(v) ? v : Math.min(MOST_DB, Math.max(-MOST_DB, v))));
  const kept = decimate({ frequencyHz, magnitude: bounded }, STRIP_POINTS, range, log);
  return [
    {
      ...what,
      frequencyHz: Array.from(kept, (i) => frequencyHz[i]),
      value: Array.from(kept, (i) => seven(bounded[i])),
      limits: null,
      measured: null,
    },
  ];
}

function dipOf(dip: MaterialDip, trace: string, bands: PlateFigure["bands"]): PlateDip {
  const { bandwidth } = dip;
  const design = bands.filter((band) => band.design);
  const inside = design.some(({ lowHz, highHz }) => lowHz <= dip.frequencyHz && dip.frequencyHz <= highHz);
  return {
    id: dip.id,
    trace,
    label: dip.label,
    frequencyHz: dip.frequencyHz,
    frequencyUncertaintyHz: finite(dip.frequencyUncertaintyHz),
    minimumSwr: finite(dip.minimumSwr),
    minimumSwrLow: finite(dip.minimumSwrLow),
    minimumSwrHigh: finite(dip.minimumSwrHigh),
    returnLossDb: dip.returnLossDb,
    returnLossLowDb: finite(dip.returnLossLowDb),
    returnLossHighDb: finite(dip.returnLossHighDb),
    prominenceDb: dip.prominenceDb,
    bandwidth: bandwidth && {
      limitSwr: bandwidth.limitSwr,
      lowHz: bandwidth.lowHz,
      highHz: bandwidth.highHz,
      widthHz: bandwidth.widthHz,
      widthLowHz: finite(bandwidth.widthLowHz),
      widthHighHz: finite(bandwidth.widthHighHz),
      open: bandwidth.open,
      shared: bandwidth.shared,
    },
    q: finite(dip.q),
    qLow: finite(dip.qLow),
    qHigh: finite(dip.qHigh),
    method: dip.method,
    edge: dip.edge,
    inDesignBand: design.length === 0 ? null : inside,
    verdict: dip.verdict,
  };
}

/** JSON has no Infinity and no NaN. */
function finite(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null;
}

/** Far more digits than any line shows, and no more bytes than needed. */
function seven(value: number): number | null {
  return Number.isFinite(value) ? Number(value.toPrecision(7)) : null;
}

function oneOf(values: readonly number[]): number | null {
  return values.length > 0 && values.every((value) => value === values[0]) ? values[0] : null;
}

/** Enough for a line 1600 px wide; of strips there may be two hundred. */
const CURVE_POINTS = 1600;
const STRIP_POINTS = 500;
