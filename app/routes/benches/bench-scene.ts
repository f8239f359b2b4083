import { type FrequencyAxis, frequencyAxis, frequencyScale, niceStep } from "~/charts/axis";
import { decimate, type Run } from "~/charts/decimate";
import { profilePaths } from "~/charts/paths";
import type { BenchQuality } from "~/measurement/correction/bench-quality";
import { allowedError, type Wish } from "~/measurement/correction/wish";

/** A bench's measures as strips on one frequency axis, ready to be drawn. */
export interface BenchScene {
  frequency: FrequencyAxis;
  strips: BenchStrip[];
  /** Where the wish is met by the first of the benches: shares of the width. */
  known: { fraction: number; widthFraction: number }[];
}

export interface BenchStrip {
  key: MeasureKey;
  title: string;
  hint: string;
  heightPx: number;
  ticks: { y: number; label: string }[];
  /** One a bench; both empty where that bench does not know it. */
  lines: { land: string; line: string }[];
  /** What the wish needs, where this strip can say it. */
  needed: { y: number; label: string } | null;
}

/** Null where no bench has anything to draw. */
export function benchScene(qualities: readonly BenchQuality[], wish: Wish): BenchScene | null {
  const [fromHz, toHz] = spanOf(qualities);
  if (!(fromHz < toHz)) return null;
  const scale = frequencyScale(toHz / fromHz > LOG_FROM_RATIO ? "log" : "linear", fromHz, toHz);
  const strips = MEASURES.flatMap((measure): BenchStrip[] => {
    const runs = qualities.map(({ frequencyHz, [measure.key]: values }) =>
      decimate({ frequencyHz, magnitude: values.map(drawable) }, scale, COLUMNS),
    );
    const neededDb = measure.key === "directivityDb" ? -20 * Math.log10(allowedError(wish)) : Number.NaN;
    const axis = axisOf(runs, measure, neededDb);
    if (!axis) return [];
    return [
      {
        key: measure.key,
        title: measure.title,
        hint: measure.hint,
        heightPx: STRIP_PX,
        ticks: axis.ticks,
        lines: runs.map((one) => {
          const box = { width: STRIP_WIDTH, heightPx: STRIP_PX, yOfMagnitude: axis.yOf };
          const { land, line, offScale } = profilePaths(one, box);
          return { land, line: line + offScale };
        }),
        needed: inside(axis.yOf(neededDb))
          ? { y: axis.yOf(neededDb), label: `needed: ${neededDb.toFixed(1)} dB` }
          : null,
      },
    ];
  });
  const known = (qualities[0]?.ranges ?? []).map((range) => {
    const fraction = scale.fractionOf(range.fromHz);
    return { fraction, widthFraction: scale.fractionOf(range.toHz) - fraction };
  });
  return { frequency: frequencyAxis(scale), strips, known };
}

type MeasureKey = (typeof MEASURES)[number]["key"];

interface Measure {
  zero: boolean;
  least: number;
}

function axisOf(all: readonly Run[][], { zero, least }: Measure, neededDb: number) {
  let [low, high] = zero ? [0, 0] : [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  const values = all.flatMap((runs) => runs.flatMap((run) => run.magnitudes));
  for (const value of Number.isFinite(neededDb) ? [...values, neededDb] : values) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (all.every((runs) => runs.length === 0)) return null;
  const middle = (low + high) / 2;
  if (high - low < least)
    [low, high] = zero && low >= 0 ? [0, least] : [middle - least / 2, middle + least / 2];
  const step = niceStep((high - low) / TICKS);
  const bottom = Math.floor(low / step + 1e-9) * step;
  const top = Math.ceil(high / step - 1e-9) * step;
  const yOf = (value: number) => ((top - value) / (top - bottom)) * STRIP_PX;
  const count = Math.round((top - bottom) / step);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const ticks = Array.from({ length: count + 1 }, (_, i) => {
    const value = top - i * step;
    return {
      y: yOf(value),
      label: `${(Math.abs(value) < step / 2 ? 0 : value).toFixed(decimals)}${i === 0 ? " dB" : ""}`,
    };
  });
  return { yOf, ticks };
}

function spanOf(qualities: readonly BenchQuality[]): [number, number] {
  const given = qualities.filter(({ frequencyHz }) => frequencyHz.length > 0);
  const first = given.map(({ frequencyHz }) => frequencyHz[0]);
  const last = given.map(({ frequencyHz }) => frequencyHz[frequencyHz.length - 1]);
  return [Math.min(...first), Math.max(...last)];
}

/** An infinite figure (a load that gave exactly nothing) has no place on an axis. */
function drawable(value: number): number {
  return Number.isNaN(value) ? Number.NaN : Math.min(MOST_DB, Math.max(-MOST_DB, value));
}

function inside(y: number): boolean {
  return y >= 0 && y <= STRIP_PX;
}

/** In the order in which they are drawn. `zero`: the axis shows 0 dB; `least`: the narrowest stretch of it, dB. */
export const MEASURES = [
  {
    key: "directivityDb",
    title: "Directivity",
    hint: "higher is better",
    zero: false,
    least: 10,
  },
  {
    key: "openShortDisagreementDb",
    title: "Open against short",
    hint: "nearer to 0 dB is better",
    zero: true,
    least: 1,
  },
  {
    key: "trackingDb",
    title: "Error of the 0 dB line",
    hint: "at most",
    zero: true,
    least: 0.5,
  },
  {
    key: "testPortMatchDb",
    title: "Test port’s return loss",
    hint: "higher is better",
    zero: false,
    least: 10,
  },
  {
    key: "insertionLossDb",
    title: "Insertion loss",
    hint: "from the through sweep down to the 0 dB line",
    zero: false,
    least: 2,
  },
  {
    key: "flatnessDb",
    title: "Flatness",
    hint: "the 0 dB line over its own middle",
    zero: true,
    least: 2,
  },
] as const;

const STRIP_PX = 88;
export const STRIP_WIDTH = 1000;
const COLUMNS = 480;
const TICKS = 3;
/** No bench of an experimenter's has more; what shows more is noise (common practice, no source). */
const MOST_DB = 90;
/** From here on the low end would be squeezed to a tenth of the width. */
const LOG_FROM_RATIO = 10;
