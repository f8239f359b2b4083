import { sweepAgain } from "~/measurement/dips/advice";
import { formatFrequency } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const tooFewPoints: Definition = {
  id: "too-few-points",
  title: "Too few points",
  says: "A dip narrower than four frequency steps can be deeper and elsewhere than its samples say. It carries advice: the span and the number of points of a sweep that would settle it.",
  formulas: [String.raw`\Delta f_\mathrm{dip} < 4\,\Delta f_\mathrm{step}`],
  source: "Common practice, no source; the intervals' cover falls off below it in simulated sweeps.",
  limits:
    "The advice trusts the width as far as it is known; a dip between two samples may be narrower still.",
  example: example(
    [
      { name: "width", label: "Width of the dip", unit: "kHz", value: 60, least: 0.01, most: 1e5 },
      { name: "step", label: "Frequency step", unit: "kHz", value: 25, least: 0.01, most: 1e4 },
    ],
    ({ width, step }) => {
      const frequencyHz = Float64Array.from({ length: 201 }, (_, i) => 14.1e6 + (i - 100) * step * 1e3);
      const again = frequencyHz[0] > 0 ? sweepAgain(frequencyHz, 100, 14.1e6, width * 1e3) : null;
      return [
        {
          label: "Sweep again",
          value: again
            ? `${formatFrequency(again.startHz)} to ${formatFrequency(again.stopHz)}, ${again.points} points`
            : "not needed",
        },
      ];
    },
  ),
};
