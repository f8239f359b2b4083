import { formatImpedance } from "~/measurement/complex/format";
import { gammaToSwr, impedanceToGamma } from "~/measurement/reflection";
import { formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const otherReference: Definition = {
  id: "other-reference",
  title: "Another reference",
  says: "The same impedance has another reflection coefficient and another SWR against another reference. Where a sweep has phase, it is brought from one to the other through its impedance.",
  formulas: [
    String.raw`\Gamma_\mathrm{new} = \frac{\Gamma-k}{1-k\,\Gamma},\qquad k=\frac{Z_\mathrm{new}-Z_\mathrm{old}}{Z_\mathrm{new}+Z_\mathrm{old}}`,
  ],
  source: "Follows from Γ = (Z − Z0)/(Z + Z0) put in twice; any text on lines.",
  limits: "Without phase it can't be done: a scalar sweep keeps its file's reference.",
  example: example(
    [
      { name: "r", label: "Resistance", unit: "Ω", value: 73, least: 0, most: 1e5 },
      { name: "x", label: "Reactance", unit: "Ω", value: 42.5, least: -1e5, most: 1e5 },
      { name: "reference", label: "Reference", unit: "Ω", value: 75, least: 1, most: 1000 },
    ],
    ({ r, x, reference }) => {
      const swrIn = (ohm: number) => {
        const gamma = impedanceToGamma({ re: r, im: x }, ohm);
        return formatSwr(gammaToSwr(Math.hypot(gamma.re, gamma.im)));
      };
      return [
        { label: "Impedance", value: formatImpedance({ re: r, im: x }) },
        { label: "SWR in 50 Ω", value: swrIn(50) },
        { label: `SWR in ${reference} Ω`, value: swrIn(reference) },
      ];
    },
  ),
};
