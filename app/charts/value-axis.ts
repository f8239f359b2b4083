/** The value axis: return loss (0 dB at the top, going down) or SWR (1 lowest, logarithmic). */

export type ChartQuantity = "rl" | "swr";

export interface ValueTick {
  y: number;
  label: string;
}

export interface ValueAxis {
  quantity: ChartQuantity;
  /** y in px from the top of the plot, not clamped; NaN for NaN. */
  yOfMagnitude: (magnitude: number) => number;
  heightPx: number;
  ticks: ValueTick[];
  /** What lies beyond the axis, in words for the chart's edge. */
  beyondTop: string;
  beyondBottom: string;
}

/** SWR beyond this is drawn at the edge and said to be off the scale: at 10 two thirds of the power come back. */
const SWR_TOP = 10;
/** Land under SWR 1, so that a cairn has ground to lie on. */
const SWR_GROUND_PX = 44;
const SWR_TICKS = [1, 1.5, 2, 3, 5, 10];
/** Return loss deeper than this is below what an amateur's bench can tell apart (common practice, no source). */
const DEEPEST_DB = 60;
const SHALLOWEST_AXIS_DB = 20;
/** Gain of up to this much (return loss below 0) still has room over the 0 dB line. */
const MOST_GAIN_DB = 6;

/** @param lowest smallest and largest abs Γ that is drawn; NaN when nothing is. */
export function valueAxis(
  quantity: ChartQuantity,
  heightPx: number,
  range: { lowestMagnitude: number; highestMagnitude: number },
): ValueAxis {
  return quantity === "swr" ? swrAxis(heightPx) : returnLossAxis(heightPx, range);
}

function returnLossAxis(
  heightPx: number,
  range: { lowestMagnitude: number; highestMagnitude: number },
): ValueAxis {
  const deepest = lossDb(range.lowestMagnitude);
  const room = Number.isNaN(deepest) ? SHALLOWEST_AXIS_DB : Math.min(deepest * 1.15 + 2, DEEPEST_DB);
  const bottomDb = Math.max(SHALLOWEST_AXIS_DB, Math.ceil(room / 10) * 10);
  const gainDb = Math.min(MOST_GAIN_DB, Math.max(0, -lossDb(range.highestMagnitude) || 0));
  const topDb = gainDb > 0.2 ? -Math.ceil(gainDb / 2) * 2 : 0;
  const perDb = heightPx / (bottomDb - topDb);
  const step = bottomDb - topDb > 45 ? 20 : bottomDb - topDb > 25 ? 10 : 5;
  const ticks: ValueTick[] = [];
  for (let db = 0; db <= bottomDb; db += step) {
    const label = db + step > bottomDb ? `${db} dB` : String(db);
    ticks.push({ y: (db - topDb) * perDb, label });
  }
  return {
    quantity: "rl",
    heightPx,
    ticks,
    yOfMagnitude: (magnitude) => (lossDb(magnitude) - topDb) * perDb,
    beyondTop: `over ${-topDb} dB of gain, off the scale`,
    beyondBottom: `deeper than ${bottomDb} dB, off the scale`,
  };
}

function swrAxis(heightPx: number): ValueAxis {
  const matchedY = heightPx - Math.min(SWR_GROUND_PX, heightPx * 0.15);
  const yOfSwr = (swr: number) => matchedY * (1 - Math.log(swr) / Math.log(SWR_TOP));
  return {
    quantity: "swr",
    heightPx,
    ticks: SWR_TICKS.map((swr) => ({ y: yOfSwr(swr), label: String(swr) })),
    // From abs Γ = 1 on there is no finite SWR: above every axis.
    yOfMagnitude: (m) => (m >= 1 ? -Infinity : yOfSwr((1 + m) / (1 - m))),
    beyondTop: `SWR over ${SWR_TOP}, off the scale`,
    beyondBottom: "",
  };
}

function lossDb(magnitude: number): number {
  return -20 * Math.log10(magnitude);
}
