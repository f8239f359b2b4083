import type { Sweep } from "../measurement/sweep.ts";

export interface Unordered {
  /** Hz, finite and not negative, in the order of the file. */
  frequencyHz: Float64Array;
  magnitude: Float64Array;
  gammaRe?: Float64Array;
  gammaIm?: Float64Array;
}

export interface Assembled {
  sweep: Sweep;
  /** Plain sentences on what was done to the order. */
  assumed: string[];
}

/**
 * Brings points into the order of a sweep: ascending, each frequency once. Points at one frequency become their mean
 * (of Γ where it is complex), gaps among them left out.
 */
export function assemble(points: Unordered, referenceOhm: number): Assembled {
  const assumed: string[] = [];
  let { frequencyHz, magnitude, gammaRe, gammaIm } = points;
  const order = directionOf(frequencyHz);
  if (order !== "ascending") {
    const index = order === "descending" ? reversed(frequencyHz.length) : sorted(frequencyHz);
    frequencyHz = pick(frequencyHz, index);
    magnitude = pick(magnitude, index);
    gammaRe &&= pick(gammaRe, index);
    gammaIm &&= pick(gammaIm, index);
    assumed.push(
      order === "descending"
        ? "The frequencies descend in the file: the sweep was turned round."
        : "The frequencies are not in order in the file: the points were sorted.",
    );
  }
  const repeats = countRepeats(frequencyHz);
  if (repeats > 0) {
    const starts = groupStarts(frequencyHz, repeats);
    magnitude = means(magnitude, starts);
    if (gammaRe && gammaIm) {
      gammaRe = means(gammaRe, starts);
      gammaIm = means(gammaIm, starts);
      for (let i = 0; i < magnitude.length; i++) magnitude[i] = Math.hypot(gammaRe[i], gammaIm[i]);
    }
    frequencyHz = pick(frequencyHz, starts);
    assumed.push(
      `${repeats} ${repeats === 1 ? "point repeats" : "points repeat"} a frequency: each frequency was taken once, with the mean of its values.`,
    );
  }
  const sweep: Sweep = { frequencyHz, magnitude, referenceOhm, plane: "instrument" };
  if (gammaRe && gammaIm) Object.assign(sweep, { gammaRe, gammaIm });
  return { sweep, assumed };
}

function directionOf(f: Float64Array): "ascending" | "descending" | "mixed" {
  let up = true;
  let down = true;
  for (let i = 1; i < f.length; i++) {
    if (f[i] < f[i - 1]) up = false;
    if (f[i] > f[i - 1]) down = false;
    if (!up && !down) return "mixed";
  }
  return up ? "ascending" : "descending";
}

function reversed(n: number): Uint32Array {
  return Uint32Array.from({ length: n }, (_, i) => n - 1 - i);
}

function sorted(f: Float64Array): Uint32Array {
  return Uint32Array.from({ length: f.length }, (_, i) => i).sort((a, b) => f[a] - f[b] || a - b);
}

function pick(values: Float64Array, index: Uint32Array): Float64Array {
  const out = new Float64Array(index.length);
  for (let i = 0; i < index.length; i++) out[i] = values[index[i]];
  return out;
}

function countRepeats(f: Float64Array): number {
  let repeats = 0;
  for (let i = 1; i < f.length; i++) if (f[i] === f[i - 1]) repeats++;
  return repeats;
}

function groupStarts(f: Float64Array, repeats: number): Uint32Array {
  const starts = new Uint32Array(f.length - repeats);
  let n = 0;
  for (let i = 0; i < f.length; i++) if (i === 0 || f[i] !== f[i - 1]) starts[n++] = i;
  return starts;
}

function means(values: Float64Array, starts: Uint32Array): Float64Array {
  const out = new Float64Array(starts.length);
  for (let g = 0; g < starts.length; g++) {
    let sum = 0;
    let n = 0;
    for (let i = starts[g]; i < (starts[g + 1] ?? values.length); i++)
      if (!Number.isNaN(values[i])) {
        sum += values[i];
        n++;
      }
    out[g] = n > 0 ? sum / n : Number.NaN;
  }
  return out;
}
