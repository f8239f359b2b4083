import { inventScale, type ValueScale, valuesOn } from "./axis.ts";
import { type InventedSweep, inventSweep, type TrueDip, trueDips } from "./invented-sweep.ts";
import type { Random } from "./random.ts";

/** What is true of a picture, in the form of the files beside it. */
export interface Truth {
  kind: string;
  skin: string;
  size: [number, number];
  plot: { left: number; top: number; right: number; bottom: number; nx: number | null; ny: number | null };
  axis: {
    start_mhz: number;
    stop_mhz: number;
    scale: "linear" | "log";
    y_top: number;
    y_bottom: number;
    quantity: string;
    unit: string;
    zero_db_at: number;
    printed: string;
  };
  traces: { color: [number, number, number]; role: string }[];
  drawn: { mhz: number[]; value: number[] };
  dips: TrueDip[];
  file: string;
  degraded: string[];
}

/** What is drawn, before any place on the paper is given to it. */
export interface Content {
  sweep: InventedSweep;
  scale: ValueScale;
  values: number[];
}

export function inventContent(random: Random, allowLog: boolean): Content {
  const sweep = inventSweep(random, allowLog);
  const scale = inventScale(random);
  return { sweep, scale, values: valuesOn(scale, sweep, random.pick([0, 0, 0.05, 0.15]), random) };
}

/** The truth of a picture drawn in `box`, whose numbers are pixel edges. */
export function truthOf(
  content: Content,
  about: {
    name: string;
    skin: string;
    size: [number, number];
    printed: string;
    color: string;
    columns: number | null;
  },
  box: { left: number; top: number; right: number; bottom: number },
): Truth {
  const { sweep, scale, values } = content;
  const limit = 3 * Math.abs(scale.top - scale.bottom);
  return {
    kind: `${sweep.startMhz}-${sweep.stopMhz}`,
    skin: about.skin,
    size: about.size,
    plot: {
      left: box.left - 0.5,
      top: box.top - 0.5,
      right: box.right - 0.5,
      bottom: box.bottom - 0.5,
      nx: about.columns,
      ny: scale.rows,
    },
    axis: {
      start_mhz: sweep.startMhz,
      stop_mhz: sweep.stopMhz,
      scale: sweep.scale,
      y_top: scale.top,
      y_bottom: scale.bottom,
      quantity: scale.quantity,
      unit: scale.unit,
      zero_db_at: scale.zeroDb,
      printed: about.printed,
    },
    traces: [
      {
        color: [1, 3, 5].map((i) => Number.parseInt(about.color.slice(i, i + 2), 16)) as [
          number,
          number,
          number,
        ],
        role: "sweep",
      },
    ],
    drawn: {
      mhz: sweep.mhz.map((f) => Number(f.toPrecision(8))),
      value: values.map((v) => Number(Math.min(limit, Math.max(-limit, v)).toFixed(4))),
    },
    dips: trueDips(sweep),
    file: about.name,
    degraded: [],
  };
}
