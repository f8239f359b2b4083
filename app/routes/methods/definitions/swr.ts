import { gammaToSwr, returnLossDbToGamma } from "~/measurement/reflection";
import { formatSwr } from "~/measurement/units";
import { type Definition, example, plain } from "../definition";

export const swr: Definition = {
  id: "swr",
  title: "SWR",
  says: "The ratio of the highest to the lowest voltage along a line that carries a wave and its reflection. It depends on the reference impedance, which pages name beside it when it is not 50 Ω.",
  formulas: [String.raw`\mathrm{SWR} = \frac{1+|\Gamma|}{1-|\Gamma|}`],
  source:
    "T. S. Bird, IEEE Antennas and Propagation Magazine 51(2), 166–167, 2009; any text on lines, e.g. D. M. Pozar, Microwave Engineering, chapter 2 (from memory, not seen).",
  limits:
    "From abs Γ = 1 on there is no finite SWR: it is shown as ∞, never cut to a number. An SWR in one reference is no multiple of that in another: see “Another reference”.",
  example: example(
    [{ name: "loss", label: "Return loss", unit: "dB", value: 14, least: -3, most: 80 }],
    ({ loss }) => [
      { label: "abs Γ", value: plain(returnLossDbToGamma(loss)) },
      { label: "SWR", value: formatSwr(gammaToSwr(returnLossDbToGamma(loss)), null, null) },
    ],
  ),
};
