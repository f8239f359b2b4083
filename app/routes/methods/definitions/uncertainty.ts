import { analyse } from "~/measurement/analyse";
import { formatWidth } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep, scalar } from "../example-sweep";

export const uncertainty: Definition = {
  id: "uncertainty",
  title: "Uncertainty of a number",
  says: "Every shown number has an interval that is meant to hold the truth 95 times in 100: from the fit's covariance (noise), the frequency step, and for pictures half a pixel and the trace's width, added as independent parts. The bench's errors are worst-case limits and come on top. What is not known is said, never taken for zero. Numbers print with the digits that their interval supports.",
  formulas: [
    String.raw`h = \sqrt{h_1^2+h_2^2+\dots},\qquad h_\mathrm{fit} = t_{95}\,\sqrt{g^{\mathsf T} C\,g}`,
  ],
  source:
    "JCGM 100:2008, “Guide to the expression of uncertainty in measurement”, 5.1.2 (from memory, not seen); how often intervals hold the truth is measured on thousands of simulated sweeps.",
  limits:
    "An unknown part makes the whole unknown. The example counts afresh on sixty invented sweeps, so a few per cent up or down are chance.",
  example: example(
    [
      { name: "noise", label: "Noise", unit: "dB", value: 0.2, least: 0.001, most: 1 },
      { name: "points", label: "Points in the sweep", value: 81, least: 21, most: 201, whole: true },
    ],
    ({ noise, points }) => {
      let [held, told, width] = [0, 0, 0];
      for (let draw = 1; draw <= TRIALS; draw++) {
        const frequencyHz = 14.15e6 + draw * 777;
        const sweep = exampleSweep({ resistanceOhm: 40, q: 12, frequencyHz, points, noiseDb: noise, draw });
        const found = analyse(scalar(sweep)).dips.find(({ edge }) => !edge);
        if (!found || found.frequencyUncertaintyHz === null) continue;
        told++;
        width += found.frequencyUncertaintyHz;
        if (Math.abs(found.frequencyHz - frequencyHz) <= found.frequencyUncertaintyHz) held++;
      }
      return [
        { label: "Intervals of the frequency that hold the truth", value: `${held} of ${told}` },
        {
          label: "Their half-width, on average",
          value: told ? formatWidth(width / told) : "unknown",
        },
      ];
    },
  ),
};

const TRIALS = 60;
