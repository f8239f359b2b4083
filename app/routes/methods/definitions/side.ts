import { sideAt } from "~/measurement/complex/side";
import { impedanceToGamma, returnLossDbToGamma } from "~/measurement/reflection";
import type { Sweep } from "~/measurement/sweep";
import { type Definition, example, plain } from "../definition";

export const side: Definition = {
  id: "side",
  title: "Which side of the reference",
  says: "SWR 1.4 at a dip may be 36 Ω or 70 Ω: what helps one harms the other. With phase the side is told, where the noise and the bench's directivity could not have turned it.",
  formulas: [
    String.raw`\operatorname{Re}\Gamma<0 \Rightarrow R<Z_0,\qquad |\operatorname{Re}\Gamma| > 1.96\,\sigma_\Gamma + d`,
  ],
  source:
    "Follows from Γ = (Z − Z0)/(Z + Z0) at a dip, where the reactance is small; own rule for the limit.",
  limits:
    "At the plane of the sweep: a quarter wave of line turns one side into the other. An unknown directivity is said.",
  example: example(
    [
      { name: "r", label: "Resistance", unit: "Ω", value: 45, least: 0, most: 1e4 },
      { name: "directivity", label: "Directivity", unit: "dB", value: 30, least: 5, most: 80 },
    ],
    ({ r, directivity }) => {
      const found = sideAt(flatSweep(r, returnLossDbToGamma(directivity)), 14e6);
      return [
        { label: "Side of 50 Ω", value: found?.side ?? "too near to tell" },
        { label: "Γ is known to", value: `±${plain(found?.limitGamma ?? Number.NaN, 2)}` },
      ];
    },
  ),
};

function flatSweep(r: number, directivity: number): Sweep {
  const { re, im } = impedanceToGamma({ re: r, im: 0 }, 50);
  const all = (value: number) => new Float64Array(5).fill(value);
  return {
    frequencyHz: Float64Array.of(13e6, 13.5e6, 14e6, 14.5e6, 15e6),
    magnitude: all(Math.hypot(re, im)),
    gammaRe: all(re),
    gammaIm: all(im),
    referenceOhm: 50,
    plane: "port",
    benchLimits: { directivity: all(directivity), tracking: all(0), match: all(0) },
  };
}
