import { analyse } from "~/measurement/analyse";
import { formatOhm } from "~/measurement/complex/format";
import { reactanceZeros } from "~/measurement/complex/reactance-zeros";
import { impedanceToGamma } from "~/measurement/reflection";
import type { Sweep } from "~/measurement/sweep";
import { formatFrequency } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const resonance: Definition = {
  id: "resonance",
  title: "Resonance",
  says: "Where the reactance passes through zero: series where it rises (the current is high), parallel where it falls (the voltage is high). It is seldom the frequency of lowest SWR, and both are told. The zeros are looked for in Γ, which is smooth where the reactance jumps.",
  formulas: [String.raw`X(f_r)=0\ \Longleftrightarrow\ \operatorname{Im}\Gamma(f_r)=0,\ \Gamma\ne 1`],
  source:
    "Definition as in any text on circuits; compared with scipy's splines on ten NEC-2 antennas (within 0.002 %).",
  limits:
    "At the plane of the sweep: through a length of line the zeros are those of antenna and line together. In noise a zero counts once the imaginary part stands clear on both sides.",
  example: example(
    [
      { name: "r", label: "Resistance", unit: "Ω", value: 50, least: 5, most: 500 },
      { name: "q", label: "Q", value: 8, least: 2, most: 100 },
      { name: "rise", label: "Resistance rises per width by", unit: "Ω", value: 40, least: 0, most: 200 },
    ],
    ({ r, q, rise }) => {
      const sweep = risingSweep(r, q, rise);
      const zeros = reactanceZeros(sweep);
      const found = analyse(sweep).dips.find(({ edge }) => !edge);
      return [
        {
          label: "Zero of the reactance",
          value: zeros.length
            ? zeros
                .map(
                  (zero) =>
                    `${formatFrequency(zero.frequencyHz, zero.frequencyHalfHz)} (${zero.kind}, R ${formatOhm(zero.resistanceOhm)})`,
                )
                .join(", ")
            : "none",
        },
        {
          label: "Lowest SWR",
          value: found ? formatFrequency(found.frequencyHz, found.frequencyUncertaintyHz) : "no dip",
        },
      ];
    },
  ),
};

/** A series resonator at 14.15 MHz whose resistance rises with frequency, as a vertical's does. */
function risingSweep(r: number, q: number, rise: number): Sweep {
  const f0 = 14.15e6;
  const frequencyHz = Float64Array.from({ length: 401 }, (_, i) => f0 * (1 + ((i - 200) / 200) * (0.8 / q)));
  const gammas = Array.from(frequencyHz, (hz) =>
    impedanceToGamma({ re: Math.max(1, r + rise * q * (hz / f0 - 1)), im: r * q * (hz / f0 - f0 / hz) }, 50),
  );
  return {
    frequencyHz,
    magnitude: Float64Array.from(gammas, ({ re, im }) => Math.hypot(re, im)),
    gammaRe: Float64Array.from(gammas, ({ re }) => re),
    gammaIm: Float64Array.from(gammas, ({ im }) => im),
    referenceOhm: 50,
    plane: "port",
  };
}
