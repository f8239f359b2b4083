/** The frequency axis: the map's easting, linear or logarithmic, with its ticks. */
import { assignTiers, TIER_PLOT_WIDTHS_PX } from "./tiers.ts";

export type FrequencyScaleKind = "linear" | "log";

export interface FrequencyScale {
  kind: FrequencyScaleKind;
  fromHz: number;
  toHz: number;
  /** 0 at `fromHz`, 1 at `toHz`; below and above for what lies outside. */
  fractionOf: (hz: number) => number;
  hzAt: (fraction: number) => number;
}

export interface FrequencyTick {
  hz: number;
  fraction: number;
  /** In the axis's unit; null for a mark without a label. */
  label: string | null;
  tier: number;
}

export interface FrequencyAxis {
  ticks: FrequencyTick[];
  /** `MHz` or `MHz log` */
  caption: string;
}

const LABEL_CHARACTER_PX = 7.2;
const LABEL_GAP_PX = 14;
const MOST_LINEAR_TICKS = 16;
/** Below this ratio of its ends a logarithmic axis is nearly linear and gets round steps. */
const NEARLY_LINEAR_RATIO = 2.5;

/** A scale over `fromHz`..`toHz`. A single frequency (or a wrong order) is widened so that it has a middle. */
export function frequencyScale(kind: FrequencyScaleKind, fromHz: number, toHz: number): FrequencyScale {
  let [from, to] = fromHz <= toHz ? [fromHz, toHz] : [toHz, fromHz];
  if (!(to > from)) [from, to] = from > 0 ? [from * 0.99, from * 1.01] : [from - 1, from + 1];
  // A logarithmic axis cannot begin at zero.
  const usable = kind === "log" && from <= 0 ? "linear" : kind;
  if (usable === "linear") {
    const span = to - from;
    return {
      kind: usable,
      fromHz: from,
      toHz: to,
      fractionOf: (hz) => (hz - from) / span,
      hzAt: (fraction) => from + fraction * span,
    };
  }
  const start = Math.log(from);
  const span = Math.log(to) - start;
  return {
    kind: usable,
    fromHz: from,
    toHz: to,
    fractionOf: (hz) => (hz > 0 ? (Math.log(hz) - start) / span : -1),
    hzAt: (fraction) => Math.exp(start + fraction * span),
  };
}

/** Round frequencies along the axis, each with the narrowest tier that has room for its label. */
export function frequencyAxis(
  scale: FrequencyScale,
  plotWidthsPx: readonly number[] = TIER_PLOT_WIDTHS_PX,
): FrequencyAxis {
  const unit = unitOf(scale);
  const linearSteps = scale.kind === "linear" || scale.toHz / scale.fromHz < NEARLY_LINEAR_RATIO;
  const ticks = linearSteps
    ? linearTicks(scale, unit.hz, plotWidthsPx)
    : logarithmicTicks(scale, unit.hz, plotWidthsPx);
  return { ticks, caption: scale.kind === "log" ? `${unit.name} log` : unit.name };
}

function unitOf({ fromHz, toHz }: FrequencyScale): { name: string; hz: number } {
  if (toHz >= 1e9 && fromHz >= 1e8) return { name: "GHz", hz: 1e9 };
  if (toHz >= 1e6) return { name: "MHz", hz: 1e6 };
  if (toHz >= 1e3) return { name: "kHz", hz: 1e3 };
  return { name: "Hz", hz: 1 };
}

function linearTicks(scale: FrequencyScale, unitHz: number, widthsPx: readonly number[]): FrequencyTick[] {
  const step = niceStep((scale.toHz - scale.fromHz) / MOST_LINEAR_TICKS);
  const decimals = Math.max(0, -Math.floor(Math.log10(step / unitHz) + 1e-9));
  const first = Math.ceil(scale.fromHz / step - 1e-9);
  const last = Math.floor(scale.toHz / step + 1e-9);
  const widest = Math.max((first * step) / unitHz, (last * step) / unitHz).toFixed(decimals).length;
  const everies = labelEveries(step, scale, widest * LABEL_CHARACTER_PX + LABEL_GAP_PX, widthsPx);
  const ticks: FrequencyTick[] = [];
  for (let index = first; index <= last; index++) {
    const tier = everies.findIndex((every) => every !== null && index % every === 0);
    const hz = index * step;
    const label = tier < 0 ? null : (hz / unitHz).toFixed(decimals);
    ticks.push({ hz, fraction: scale.fractionOf(hz), label, tier: Math.max(0, tier) });
  }
  return ticks;
}

/** For each tier, every how many steps a label fits; a wider tier only ever adds labels. */
function labelEveries(step: number, scale: FrequencyScale, labelPx: number, widthsPx: readonly number[]) {
  // The tightest pair decides on an axis that is not quite linear.
  const spacing = Math.min(scale.fractionOf(scale.fromHz + step), 1 - scale.fractionOf(scale.toHz - step));
  const everies: (number | null)[] = [];
  for (const widthPx of [...widthsPx].reverse()) {
    const before = everies[0] ?? 1;
    const fitting = [1, 2, 4, 5, 10, 20, 50, 100].find(
      (every) => every % before === 0 && isNice(step * every) && spacing * every * widthPx >= labelPx,
    );
    everies.unshift(fitting ?? null);
  }
  return everies;
}

function logarithmicTicks(
  scale: FrequencyScale,
  unitHz: number,
  widthsPx: readonly number[],
): FrequencyTick[] {
  const found: { hz: number; priority: number }[] = [];
  const lastDecade = Math.floor(Math.log10(scale.toHz) + 1e-9);
  for (let decade = Math.floor(Math.log10(scale.fromHz)); decade <= lastDecade; decade++) {
    for (let digit = 1; digit <= 9; digit++) {
      const hz = digit * 10 ** decade;
      const inside = hz >= scale.fromHz * (1 - 1e-9) && hz <= scale.toHz * (1 + 1e-9);
      if (inside) found.push({ hz, priority: DIGIT_PRIORITY[digit] });
    }
  }
  const labels = found.map(({ hz }) => String(Number((hz / unitHz).toPrecision(6))));
  const places = found.map(({ hz, priority }, index) => ({
    fraction: scale.fractionOf(hz),
    widthPx: labels[index].length * LABEL_CHARACTER_PX,
    priority,
  }));
  const tiers = assignTiers(places, widthsPx, LABEL_GAP_PX);
  return found.map(({ hz }, index) => ({
    hz,
    fraction: places[index].fraction,
    label: tiers[index] === null ? null : labels[index],
    tier: tiers[index] ?? 0,
  }));
}

/** Which of 1..9 is labelled first where room is short. */
const DIGIT_PRIORITY = [9, 0, 1, 3, 5, 2, 6, 4, 7, 8];

/** The smallest of 1, 2, 5 × 10ⁿ that is not below `least`. */
export function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  const digit = [1, 2, 5, 10].find((candidate) => candidate * power >= least * (1 - 1e-9)) ?? 10;
  return digit * power;
}

function isNice(step: number): boolean {
  const digit = step / 10 ** Math.floor(Math.log10(step) + 1e-9);
  return [1, 2, 5].some((nice) => Math.abs(digit - nice) < 1e-6);
}
