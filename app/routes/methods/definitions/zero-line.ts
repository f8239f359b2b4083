import { zeroLine as reckon } from "~/measurement/correction/zero-line";
import { gammaToReturnLossDb, gammaToSwr } from "~/measurement/reflection";
import type { Sweep } from "~/measurement/sweep";
import { formatDb, formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const zeroLine: Definition = {
  id: "zero-line",
  title: "Scalar correction: the 0 dB line",
  says: "Levels become return losses against the level of full reflection: the mean of the amplitudes of the open and the short, in which their first-order errors cancel, or one of them with a larger error. Reference sweeps on other frequencies are interpolated and never extrapolated: outside them the trace is grey.",
  formulas: [
    String.raw`|\Gamma| = \frac{A}{\tfrac12\left(A_\mathrm{open}+A_\mathrm{short}\right)},\qquad A = 10^{L/20}`,
  ],
  source:
    "Keysight N9000B Spectrum Analyzer Mode reference, p. 547: the point-by-point average of open and short “gives the best estimate of a perfect reflector”.",
  limits:
    "It corrects the size alone. Directivity and the port's match stay in the result, as limits. Open and short that disagree by more than about 1 dB speak of a fault.",
  example: example(
    [
      { name: "open", label: "Level with the open", unit: "dBm", value: -22, least: -120, most: 30 },
      { name: "short", label: "Level with the short", unit: "dBm", value: -22.6, least: -120, most: 30 },
      { name: "level", label: "Level with the antenna", unit: "dBm", value: -36, least: -150, most: 30 },
    ],
    ({ open, short, level }) => {
      const at = Float64Array.of(14e6);
      const line = reckon({ open: onePoint(open), short: onePoint(short) }, at);
      const zero = line?.amplitude[0] ?? Number.NaN;
      const magnitude = 10 ** (level / 20) / zero;
      return [
        { label: "0 dB line", value: formatDb(20 * Math.log10(zero), 0.01).replace("dB", "dBm") },
        { label: "Open over short", value: formatDb(open - short, 0.01) },
        { label: "Return loss", value: formatDb(gammaToReturnLossDb(magnitude), 0.01) },
        { label: "SWR", value: formatSwr(gammaToSwr(magnitude)) },
      ];
    },
  ),
};

function onePoint(levelDb: number): Sweep {
  return {
    frequencyHz: Float64Array.of(14e6),
    magnitude: Float64Array.of(10 ** (levelDb / 20)),
    referenceOhm: 50,
    plane: "instrument",
  };
}
