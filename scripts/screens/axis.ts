import type { InventedSweep } from "./invented-sweep.ts";
import type { Random } from "./random.ts";

export type AxisQuantity = "swr" | "return_loss_up" | "return_loss_down" | "level";

/** The vertical axis of an invented picture, in the words of the truth files. */
export interface ValueScale {
  quantity: AxisQuantity;
  unit: "swr" | "dB" | "dBm";
  top: number;
  bottom: number;
  rows: number;
  zeroDb: number;
}

export function inventScale(random: Random): ValueScale {
  const quantity = random.pick([
    "swr",
    "return_loss_up",
    "return_loss_down",
    "return_loss_down",
    "level",
  ] as const);
  if (quantity === "swr") {
    const rows = random.pick([5, 8, 10]);
    return { quantity, unit: "swr", top: 1 + random.pick([4, 5, 8, 10]), bottom: 1, rows, zeroDb: 0 };
  }
  const rows = random.pick([6, 8, 10]);
  const perRow = random.pick([3, 4, 5]);
  if (quantity === "return_loss_up")
    return { quantity, unit: "dB", top: rows * perRow, bottom: 0, rows, zeroDb: 0 };
  const top = quantity === "level" ? random.pick([0, -5, -10]) : random.pick([0, 0, 5, 10]);
  const zeroDb = quantity === "level" ? Math.round(10 * (top - random.between(3, 8))) / 10 : 0;
  return {
    quantity,
    unit: quantity === "level" ? "dBm" : "dB",
    top,
    bottom: top - rows * perRow,
    rows,
    zeroDb,
  };
}

/** The sweep in the axis' unit, with measuring noise in dB. */
export function valuesOn(scale: ValueScale, sweep: InventedSweep, noiseDb: number, random: Random): number[] {
  return sweep.gamma.map((clean) => {
    const g = Math.min(0.9999, clean * 10 ** ((noiseDb * (random.next() + random.next() - 1)) / 20));
    if (scale.quantity === "swr") return (1 + g) / (1 - g);
    const db = 20 * Math.log10(g);
    return scale.quantity === "return_loss_up" ? -db : db + scale.zeroDb;
  });
}
