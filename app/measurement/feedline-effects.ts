import type { CableEntry } from "./cable-entry.ts";
import type { BenchLimits, PictureLimits, Sweep, Warning } from "./sweep.ts";

/** What taking out a feedline does to limits, and what there is to say of it. `gain` is abs Γ there over abs Γ here, per point. */

/** The bench's limits at the far end, with what the uncertainty of the loss (a part of it) adds to the tracking. */
export function scaleLimits(
  { directivity, tracking, match }: BenchLimits,
  gain: Float64Array,
  uncertainty: number,
): BenchLimits {
  const feedline = Float64Array.from(tracking, (t, i) => (gain[i] ** uncertainty - 1) * (1 + t));
  return {
    directivity: times(directivity, gain),
    tracking: Float64Array.from(tracking, (t, i) => t + feedline[i]),
    match: Float64Array.from(match, (m, i) => m / gain[i]),
    ...(uncertainty > 0 && { feedline }),
  };
}

/** A picture's limits at the far end. */
export function scalePicture(limits: PictureLimits, gain: Float64Array): PictureLimits {
  return {
    frequencyHz: limits.frequencyHz,
    magnitudeLow: times(limits.magnitudeLow, gain),
    magnitudeHigh: times(limits.magnitudeHigh, gain),
  };
}

/** A cable of another impedance than the sweep's reference. */
export function otherImpedance(name: string, ownOhm: number, seenOhm: number, complex: boolean): Warning {
  return {
    code: "cable-impedance",
    message: complex
      ? `${name} is a ${ownOhm} Ω cable and the sweep is referred to ${seenOhm} Ω: the line was removed in ${ownOhm} Ω, through the impedance; limits are not known there.`
      : `${name} is a ${ownOhm} Ω cable and the sweep is referred to ${seenOhm} Ω. Without phase the step between the two can't be removed: values at the antenna are a guess.`,
  };
}

/** What the removal made of the values: over full reflection, or not known. */
export function lineWarnings(
  before: Sweep,
  after: Sweep,
  gain: Float64Array,
  line: { name: string; rangeMhz?: { low: number; high: number } },
  cable: CableEntry | null,
): Warning[] {
  const warnings: Warning[] = [];
  let over = 0;
  let unknown = 0;
  for (let i = 0; i < gain.length; i++) {
    if (after.magnitude[i] > 1 && !(before.magnitude[i] > 1)) over++;
    if (Number.isNaN(gain[i]) && !Number.isNaN(before.magnitude[i])) unknown++;
  }
  if (over > 0)
    warnings.push({
      code: "feedline-over-unity",
      message: `With the feedline removed, ${over} of ${gain.length} points return more than was sent: the cable entry is wrong (too long or too lossy), or the sweep's 0 dB line is. They are kept, marked, and have no SWR.`,
    });
  if (cable && unknown > 0)
    warnings.push({
      code: "cable-range",
      message: `${unknown} of ${gain.length} points lie outside the frequencies for which ${cable.name} has a loss in the table; they are gaps at the antenna. Give k1 and k2 of your own to go further.`,
    });
  if (!cable && line.rangeMhz && unknown > 0)
    warnings.push({
      code: "cable-range",
      message: `${unknown} of ${gain.length} points lie outside the frequencies of the points that ${line.name} was fitted to (${line.rangeMhz.low} to ${line.rangeMhz.high} MHz); they are gaps at the antenna. Give points that reach further, or k1 and k2.`,
    });
  const firstHz = (cable?.points[0].mhz ?? 0) * 1e6;
  const below = before.frequencyHz.reduce(
    (n, hz, i) => n + Number(hz < firstHz && !Number.isNaN(gain[i])),
    0,
  );
  if (cable && below > 0)
    warnings.push({
      code: "cable-below-sheet",
      message: `The sheet of ${cable.name} begins at ${cable.points[0].mhz} MHz: at ${below} of ${gain.length} points the loss follows from the skin effect, not from a printed figure.`,
    });
  return warnings;
}

function times(values: Float64Array, gain: Float64Array): Float64Array {
  return values.map((value, i) => value * gain[i]);
}
