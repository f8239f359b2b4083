import { analyse } from "~/measurement/analyse";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep, scalar } from "../example-sweep";

export const lowestSwr: Definition = {
  id: "lowest-swr",
  title: "Frequency and lowest SWR of a dip",
  says: "From a series resonator behind a constant loss, fitted to the samples around the dip out to about SWR 5. If it does not fit within the noise, a parabola through three samples; if the dip has fewer than three, the lowest sample. The page says which.",
  formulas: [
    String.raw`|\Gamma|^2 = a^2\,\frac{(r-1)^2+u^2}{(r+1)^2+u^2},\qquad u = r\,Q\left(\frac{f}{f_0}-\frac{f_0}{f}\right)`,
  ],
  source:
    "The reflection of a series R-L-C, by least squares after K. Levenberg 1944 and D. W. Marquardt 1963 (from memory, not seen); own tests against scipy and closed forms.",
  limits:
    "Lowest SWR, the zero of the reactance and the middle of the band are three frequencies, and each is called by its own name. r and 1/r can't be told apart without phase.",
  example: example(
    [
      { name: "r", label: "Resistance at resonance", unit: "Ω", value: 40, least: 5, most: 500 },
      { name: "q", label: "Q", value: 12, least: 2, most: 300 },
      { name: "points", label: "Points in the sweep", value: 101, least: 5, most: 2001, whole: true },
      { name: "noise", label: "Noise", unit: "dB", value: 0.1, least: 0, most: 2 },
    ],
    ({ r, q, points, noise }) => {
      const sweep = exampleSweep({ resistanceOhm: r, q, frequencyHz: TRUE_HZ, points, noiseDb: noise });
      const found = analyse(scalar(sweep)).dips.find(({ edge }) => !edge);
      const truth = {
        label: "In truth",
        value: `${formatFrequency(TRUE_HZ)}, SWR ${formatSwr(Math.max(r / 50, 50 / r))}`,
      };
      if (!found) return [{ label: "Dip", value: "none stands out" }, truth];
      return [
        { label: "Frequency", value: formatFrequency(found.frequencyHz, found.frequencyUncertaintyHz) },
        {
          label: "Lowest SWR",
          value: formatSwr(found.minimumSwr, found.minimumSwrNoiseLow, found.minimumSwrNoiseHigh),
        },
        { label: "By", value: METHODS[found.method] },
        truth,
      ];
    },
  ),
};

const TRUE_HZ = 14.15e6;
const METHODS = { fit: "the fitted resonator", parabola: "a parabola", sample: "the lowest sample" } as const;
