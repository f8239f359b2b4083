import { trueLimits } from "~/measurement/limits/worst-case";
import { gammaToReturnLossDb, gammaToSwr, returnLossDbToGamma } from "~/measurement/reflection";
import { formatSwr } from "~/measurement/units";
import { type Definition, example, plain } from "../definition";

export const directivity: Definition = {
  id: "directivity",
  title: "Limits from directivity, match and tracking",
  says: "What a bridge passes by itself (directivity d), its own port's mismatch M and the error T of the 0 dB line bound what the true abs Γ may be. To first order it is the formula below; the limits are solved for the whole model. These are worst-case limits: the truth lies inside them however the errors' phases fall.",
  formulas: [
    String.raw`\bigl||\Gamma|-|\Gamma_m|\bigr| \le d + T\,|\Gamma_m| + M\,|\Gamma_m|^2`,
    String.raw`d = 10^{-D/20},\quad M = 10^{-M_\mathrm{dB}/20},\quad T = 10^{T_\mathrm{dB}/20}-1`,
  ],
  source:
    "The manner of scalar reflectometer notes (Hewlett-Packard AN 183, “A + Bρ + Cρ²”; from memory, not seen). A reading of 30 dB with 40 dB of directivity lies between 27.6 and 33.3 dB, as in published tables of directivity errors.",
  limits:
    "Without a load sweep or a given directivity the limits are unknown, and are shown as unknown. Where d reaches abs Γ the return loss has no upper limit.",
  example: example(
    [
      { name: "directivity", label: "Directivity", unit: "dB", value: 40, least: 5, most: 80 },
      { name: "match", label: "Return loss of the port", unit: "dB", value: 30, least: 5, most: 80 },
      { name: "tracking", label: "Error of the 0 dB line", unit: "dB", value: 0.1, least: 0, most: 3 },
      { name: "loss", label: "Return loss read", unit: "dB", value: 20, least: 0.1, most: 70 },
    ],
    ({ directivity, match, tracking, loss }) => {
      const measured = returnLossDbToGamma(loss);
      const { low, high } = trueLimits(measured, {
        directivity: returnLossDbToGamma(directivity),
        match: returnLossDbToGamma(match),
        tracking: 10 ** (tracking / 20) - 1,
      });
      const swr = (gamma: number) => formatSwr(gammaToSwr(gamma));
      const lossAt = (gamma: number) => plain(Math.max(0, gammaToReturnLossDb(gamma)), 4);
      return [
        { label: "SWR", value: `${swr(measured)}, between ${swr(low)} and ${swr(high)}` },
        { label: "Return loss", value: `between ${lossAt(high)} and ${lossAt(low)} dB` },
      ];
    },
  ),
};
