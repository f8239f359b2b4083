import type { Quantity, Warning } from "../sweep.ts";
import type { ReferenceRole } from "./references.ts";

/** How the files behind the sweeps were read, where that is known. */
export type ReadAs = Partial<Record<"sweep" | ReferenceRole, { quantity: Quantity; zeroDb?: number | null }>>;

/** Files that were read as different things, as far as it is known how they were read. */
export function scaleFaults(readAs: ReadAs): Warning[] {
  const { sweep, through: _through, ...references } = readAs;
  if (!sweep) return [];
  for (const [role, reference] of Object.entries(references)) {
    const levels = [sweep, reference].map(({ quantity }) => quantity === "level");
    if (levels[0] !== levels[1])
      return [
        {
          code: "level-and-loss",
          message: `The sweep was read as ${sweep.quantity} and the ${role} as ${reference.quantity}: a level and a reflection are only comparable where the instrument's own 0 dB line is at 0 dB.`,
        },
      ];
    if (levels[0] && (sweep.zeroDb ?? 0) !== (reference.zeroDb ?? 0))
      return [
        {
          code: "other-zero",
          message: `The sweep was read with its 0 dB line at ${sweep.zeroDb ?? 0} dB and the ${role} at ${reference.zeroDb ?? 0} dB: their ratio is off by the difference. Read both with the same one.`,
        },
      ];
  }
  return [];
}

/** A corrected sweep that can't be one: the scales of sweep and references don't belong together. */
export function outcomeFaults(corrected: Float64Array): Warning[] {
  const values = corrected.filter((value) => !Number.isNaN(value)).sort();
  if (values.length === 0) return [];
  const middle = 20 * Math.log10(values[values.length >> 1]);
  const top = 20 * Math.log10(values[values.length - 1]);
  if (middle > OVER_DB)
    return [
      {
        code: "not-one-scale",
        message: `Half of the corrected sweep lies more than ${middle.toFixed(1)} dB over full reflection. Sweep and references are not levels of one setting: one was read as a level and the other as a loss, or the power or the attenuator was changed in between.`,
      },
    ];
  if (top < UNDER_DB)
    return [
      {
        code: "all-far-below",
        message: `No point of the corrected sweep comes nearer to full reflection than ${(-top).toFixed(0)} dB. That is a load, or sweep and references are not levels of one setting.`,
      },
    ];
  return [];
}

/**
 * Noise and connectors give a few tenths of a decibel over full reflection, seldom one (common practice, no source).
 */
const OVER_DB = 1;
/**
 * Every antenna reflects out of its bands; a long lossy feedline has been seen to leave 12 dB (common practice, no
 * source).
 */
const UNDER_DB = -20;
