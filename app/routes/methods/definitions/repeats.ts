import { gammaToSwr } from "~/measurement/reflection";
import { averageRepeats } from "~/measurement/repeats";
import { formatSwr } from "~/measurement/units";
import { type Definition, example, plain } from "../definition";
import { exampleSweep } from "../example-sweep";

export const repeats: Definition = {
  id: "repeats",
  title: "Repeat sweeps",
  says: "Several sweeps of the same thing are averaged point by point, with their spread: Γ with its phase where all have one, else the reflected power. A spread larger than the limits is said aloud, as something else has changed between the sweeps.",
  formulas: [
    String.raw`\bar x = \frac1n\sum x_i,\qquad s^2 = \frac{1}{n-1}\sum (x_i-\bar x)^2,\qquad h = \frac{t_{95}(n-1)\,s}{\sqrt n}`,
  ],
  source:
    "JCGM 100:2008, “Guide to the expression of uncertainty in measurement”, 4.2 and G.3 (from memory, not seen).",
  limits:
    "Only inside the frequencies that all share. What is the same each time, as the bench's own errors, does not average away.",
  example: example(
    [
      { name: "count", label: "Sweeps", value: 5, least: 1, most: 20, whole: true },
      { name: "noise", label: "Noise of each", unit: "dB", value: 0.3, least: 0, most: 3 },
    ],
    ({ count, noise }) => {
      const sweeps = Array.from({ length: count }, (_, i) =>
        exampleSweep({
          resistanceOhm: 80,
          q: 12,
          frequencyHz: 14.15e6,
          points: 41,
          noiseDb: noise,
          draw: i + 1,
        }),
      );
      const mean = averageRepeats(sweeps);
      const at = 20;
      if (!mean) return [{ label: "Mean", value: "unknown" }];
      return [
        { label: "Mean of abs Γ at 14.15 MHz", value: plain(mean.sweep.magnitude[at], 3) },
        { label: "SWR of the mean", value: formatSwr(gammaToSwr(mean.sweep.magnitude[at])) },
        { label: "Spread of one sweep", value: plain(mean.spread[at], 2) },
        { label: "Half-width of the mean", value: plain(mean.halfWidth[at], 2) },
      ];
    },
  ),
};
