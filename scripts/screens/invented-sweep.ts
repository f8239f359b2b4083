import type { Random } from "./random.ts";

/** An invented sweep with its truth. No antenna was measured. */
export interface InventedSweep {
  mhz: number[];
  /** abs Γ, without the noise. */
  gamma: number[];
  startMhz: number;
  stopMhz: number;
  scale: "linear" | "log";
}

export interface TrueDip {
  mhz: number;
  swr: number;
  return_loss_db: number;
  prominence_db: number;
}

const SPANS: [number, number, "linear" | "log"][] = [
  [1.5, 31.5, "linear"],
  [3, 33, "linear"],
  [6.9, 7.4, "linear"],
  [13, 15, "linear"],
  [1, 5, "linear"],
  [0.3, 3.3, "linear"],
  [1, 100, "linear"],
  [1, 500, "linear"],
  [144, 148, "linear"],
  [40, 60, "linear"],
  [420, 450, "linear"],
  [400, 500, "linear"],
  [1, 100, "log"],
  [1, 1000, "log"],
  [10, 1000, "log"],
];

/** Some series resonances behind a constant loss (the model of MEASUREMENT section 2). */
export function inventSweep(random: Random, allowLog: boolean): InventedSweep {
  const [startMhz, stopMhz, scale] = random.pick(SPANS.filter((s) => allowLog || s[2] === "linear"));
  const points = random.pick([201, 401, 501, 801, 1001]);
  const place = (t: number) =>
    scale === "log" ? startMhz * (stopMhz / startMhz) ** t : startMhz + (stopMhz - startMhz) * t;
  const mhz = Array.from({ length: points }, (_, i) => place(i / (points - 1)));
  const loss = random.between(0.93, 0.99);
  const gamma = mhz.map(() => loss);
  const count = random.whole(1, 5);
  for (let k = 0; k < count; k++) {
    const t = 0.06 + (0.88 * (k + random.between(0.25, 0.75))) / count;
    const f0 = place(t);
    const width =
      scale === "log" ? f0 * random.between(0.05, 0.12) : (stopMhz - startMhz) * random.between(0.01, 0.035);
    const r = random.chance(0.5) ? random.between(0.45, 0.93) : random.between(1.08, 2.2);
    const q = f0 / width;
    mhz.forEach((f, i) => {
      const u = r * q * (f / f0 - f0 / f);
      gamma[i] *= Math.sqrt(((r - 1) ** 2 + u * u) / ((r + 1) ** 2 + u * u));
    });
  }
  return { mhz, gamma, startMhz, stopMhz, scale };
}

/** Local minima of abs Γ with 2 dB prominence and more, in return loss. */
export function trueDips({ mhz, gamma }: InventedSweep): TrueDip[] {
  const loss = gamma.map((g) => -20 * Math.log10(g));
  const dips: TrueDip[] = [];
  for (let i = 1; i + 1 < loss.length; i++) {
    if (!(loss[i] > loss[i - 1] && loss[i] >= loss[i + 1])) continue;
    const base = (step: number) => {
      let low = loss[i];
      for (let j = i + step; j >= 0 && j < loss.length && loss[j] <= loss[i]; j += step)
        low = Math.min(low, loss[j]);
      return low;
    };
    const prominence = loss[i] - Math.max(base(1), base(-1));
    if (prominence < 2) continue;
    // Parabola through three points, so that the truth is not bound to the grid.
    const shift = (loss[i - 1] - loss[i + 1]) / (2 * (loss[i - 1] - 2 * loss[i] + loss[i + 1]));
    const step = shift < 0 ? mhz[i] - mhz[i - 1] : mhz[i + 1] - mhz[i];
    dips.push({
      mhz: mhz[i] + shift * step,
      swr: (1 + gamma[i]) / (1 - gamma[i]),
      return_loss_db: loss[i],
      prominence_db: prominence,
    });
  }
  return dips;
}
