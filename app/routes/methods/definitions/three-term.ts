import { IDEAL_STANDARDS } from "~/measurement/bench";
import { standardGammas } from "~/measurement/correction/standards";
import { applyTerms, type ErrorTerms, solveTerms } from "~/measurement/correction/three-term";
import { type Complex, gammaToSwr, impedanceToGamma, returnLossDbToGamma } from "~/measurement/reflection";
import { formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const threeTerm: Definition = {
  id: "three-term",
  title: "Three-term correction",
  says: "With phase, open, short and load give the three errors of a one-port instrument at each frequency, and every point is freed of them. The standards are ideal unless the bench describes them: the open's capacitance, the short's inductance, the offset's delay, the load's resistance.",
  formulas: [
    String.raw`\Gamma_m = e_{00}+\frac{e_{10}e_{01}\,\Gamma}{1-e_{11}\,\Gamma}`,
    String.raw`\Gamma = \frac{\Gamma_m-e_{00}}{e_{10}e_{01}+e_{11}\left(\Gamma_m-e_{00}\right)}`,
  ],
  source: "Agilent, “Solving the one-port calibration equations”; compared with scikit-rf on the same data.",
  limits:
    "What is left is as good as the standards and the connectors' repeatability. Three standards that can't be told apart are refused.",
  example: example(
    [
      { name: "r", label: "Resistance", unit: "Ω", value: 73, least: 0, most: 1e5 },
      { name: "x", label: "Reactance", unit: "Ω", value: 42.5, least: -1e5, most: 1e5 },
      { name: "directivity", label: "Directivity", unit: "dB", value: 26, least: 5, most: 80 },
      { name: "match", label: "Return loss of the port", unit: "dB", value: 20, least: 5, most: 80 },
    ],
    ({ r, x, directivity, match }) => {
      const terms: ErrorTerms = {
        directivity: polar(returnLossDbToGamma(directivity), 30),
        match: polar(returnLossDbToGamma(match), -60),
        tracking: polar(0.9, -20),
      };
      const ideal = standardGammas(IDEAL_STANDARDS, 14e6, 50);
      const { open, short, load } = ideal;
      const seen = (gamma: Complex) => measure(terms, gamma);
      const solved = solveTerms({ open: seen(open), short: seen(short), load: seen(load) }, ideal);
      const raw = seen(impedanceToGamma({ re: r, im: x }, 50));
      const swr = ({ re, im }: Complex) => formatSwr(gammaToSwr(Math.hypot(re, im)));
      return [
        { label: "SWR as measured", value: swr(raw) },
        {
          label: "Corrected",
          value: solved ? swr(applyTerms(solved, raw)) : "the standards can't be told apart",
        },
        { label: "In truth", value: swr(impedanceToGamma({ re: r, im: x }, 50)) },
      ];
    },
  ),
};

/** Γm = e00 + e10e01·Γ/(1 − e11·Γ): an instrument with these errors. */
function measure({ directivity: d, match: m, tracking: t }: ErrorTerms, g: Complex): Complex {
  const below = { re: 1 - (m.re * g.re - m.im * g.im), im: -(m.re * g.im + m.im * g.re) };
  const top = { re: t.re * g.re - t.im * g.im, im: t.re * g.im + t.im * g.re };
  const power = below.re ** 2 + below.im ** 2;
  return {
    re: d.re + (top.re * below.re + top.im * below.im) / power,
    im: d.im + (top.im * below.re - top.re * below.im) / power,
  };
}

function polar(size: number, degrees: number): Complex {
  const angle = (degrees * Math.PI) / 180;
  return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
}
