import { CABLES } from "~/measurement/cables";
import { addedLossDb, matchedLossDb, SPEED_OF_LIGHT, swrBeyond } from "~/measurement/feedline";
import { formatDb, formatFrequency, formatSwr } from "~/measurement/units";
import { choice, type Definition, example } from "../definition";

export const feedline: Definition = {
  id: "feedline",
  title: "Feedline",
  says: "Loss in the line makes the SWR at the port better than at the antenna. The matched loss follows the cable's sheet by two coefficients, one for the skin effect and one for the insulation; removing the line multiplies abs Γ by the round trip's loss, and turns its angle back where there is one.",
  formulas: [
    String.raw`A(f) = l\left(k_1\sqrt{f}+k_2 f\right)\ \mathrm{dB},\quad f\ \text{in MHz}`,
    String.raw`|\Gamma_\mathrm{antenna}| = |\Gamma_m|\;10^{A/10},\qquad \Gamma_\mathrm{antenna} = \Gamma_m\,e^{2(\alpha+\mathrm{j}\beta)l}`,
    String.raw`A_\mathrm{SWR} = 10\log_{10}\frac{a^2-\rho^2}{a(1-\rho^2)}-A,\qquad a=10^{A/10}`,
  ],
  source:
    "Each cable's row names its sheet; a wave on a line of small loss, D. M. Pozar, Microwave Engineering, chapter 2 (from memory, not seen); additional loss due to SWR as in the ARRL Antenna Book (from memory, not seen).",
  limits:
    "Between the first and last point of the sheet only. An abs Γ over 1 at the antenna means that the cable's entry is wrong, and is said. Age and water add loss that no sheet knows.",
  example: example(
    [
      choice(
        "cable",
        "Cable",
        CABLES.map(({ name }) => name),
      ),
      { name: "length", label: "Length", unit: "m", value: 20, least: 0, most: 1000 },
      { name: "mhz", label: "Frequency", unit: "MHz", value: 14.1, least: 0.1, most: 3000 },
      { name: "swr", label: "SWR at the port", value: 1.5, least: 1, most: 100 },
    ],
    ({ cable, length, mhz, swr }) => {
      const { k1, k2, velocityFactor, points, source } = CABLES[cable];
      const [first, last] = [points[0].mhz, points[points.length - 1].mhz];
      if (mhz < first || mhz > last) {
        return [
          { label: "Matched loss", value: `unknown: the sheet goes from ${first} to ${last} MHz` },
          { label: "Sheet", value: source },
        ];
      }
      const loss = matchedLossDb({ k1, k2, lengthM: length }, mhz * 1e6);
      const far = swrBeyond(swr, loss);
      return [
        { label: "Matched loss", value: formatDb(loss, 0.01) },
        {
          label: "SWR at the antenna",
          value: Number.isFinite(far) ? formatSwr(far) : "impossible: the entry or the reading is wrong",
        },
        {
          label: "Added by that SWR",
          value: Number.isFinite(far) ? formatDb(addedLossDb(loss, far), 0.01) : "unknown",
        },
        {
          label: "Ripple of the line",
          value:
            length > 0
              ? `every ${formatFrequency((velocityFactor * SPEED_OF_LIGHT) / (2 * length))}`
              : "none",
        },
        { label: "Sheet", value: source },
      ];
    },
  ),
};
