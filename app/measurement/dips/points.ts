import { resonatorPower } from "./resonator.ts";
import type { Window } from "./window.ts";

/** What a fit takes: x = ln(f/reference), y = abs Γ², even weights. */
export interface Points {
  x: Float64Array;
  y: Float64Array;
  weight: Float64Array;
}

/**
 * All samples of the window, or evenly spaced ones, at most about `most`. Both ends are taken in as far as
 * the spacing allows.
 */
export function selectPoints(
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  { from, to }: Window,
  referenceHz: number,
  most: number,
): Points {
  const stride = Math.ceil((to - from + 1) / most);
  const points = room(Math.floor((to - from) / stride) + 1);
  for (let k = 0; k < points.x.length; k++) {
    const i = from + k * stride;
    points.x[k] = Math.log(frequencyHz[i] / referenceHz);
    points.y[k] = magnitude[i] ** 2;
  }
  return points;
}

/**
 * Means of neighbouring samples, about `most` of them, over the window (a rest shorter than one block is
 * left out). A mean over a bend is not the value in its middle: what resonator `p` bends is taken off, by
 * its values at ± the standard deviation of the block's frequencies.
 */
export function meanPoints(
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  { from, to }: Window,
  referenceHz: number,
  most: number,
  p: Float64Array,
): Points {
  const size = Math.ceil((to - from + 1) / most);
  const points = room(Math.floor((to - from + 1) / size));
  const gradient = new Float64Array(p.length);
  const shape = resonatorPower(p);
  for (let k = 0; k < points.x.length; k++) {
    const start = from + k * size;
    let power = 0;
    let hz = 0;
    for (let i = start; i < start + size; i++) {
      power += magnitude[i] * magnitude[i];
      hz += frequencyHz[i];
    }
    const x = Math.log(hz / size / referenceHz);
    const width = Math.log(frequencyHz[start + size - 1] / frequencyHz[start]);
    const spread = (width / Math.sqrt(12)) * Math.sqrt((size + 1) / (size - 1 || 1));
    const around = shape(x - spread, gradient) + shape(x + spread, gradient);
    points.x[k] = x;
    points.y[k] = power / size - (around / 2 - shape(x, gradient));
  }
  return points;
}

function room(count: number): Points {
  return { x: new Float64Array(count), y: new Float64Array(count), weight: new Float64Array(count).fill(1) };
}
