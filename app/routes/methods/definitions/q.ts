import { analyse } from "~/measurement/analyse";
import { formatRange } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep, scalar } from "../example-sweep";

export const q: Definition = {
  id: "q",
  title: "Q from the bandwidth",
  says: "The loaded quality factor from the width at an SWR limit and the resistance at the dip. A scalar sweep can't tell r from 1/r, so its Q is a range, shown as one; with phase it is one number.",
  formulas: [
    String.raw`Q\cdot\mathrm{FBW} = \frac{1}{r}\sqrt{\frac{(s-r)(r s-1)}{s}},\qquad r=\frac{R}{Z_0}`,
    String.raw`Q\cdot\mathrm{FBW} = \frac{s-1}{\sqrt{s}}\quad\text{for } r=1`,
  ],
  source:
    "A. D. Yaghjian and S. R. Best, “Impedance, bandwidth, and Q of antennas”, IEEE Trans. Antennas Propag. 53(4), 1298–1324, 2005.",
  limits:
    "For a single resonance at the antenna itself, Q over about 4. Behind a lossy feedline, through a matching network or on overlapping dips it is not the antenna's Q, and the page says so.",
  example: example(
    [
      { name: "r", label: "Resistance at resonance", unit: "Ω", value: 36, least: 26, most: 95 },
      { name: "q", label: "True Q", value: 12, least: 4, most: 300 },
    ],
    ({ r, q }) => {
      const sweep = exampleSweep({ resistanceOhm: r, q, frequencyHz: 14.15e6, points: 201 });
      const of = (one: typeof sweep) => {
        const found = analyse(one).dips.find(({ edge }) => !edge);
        return found ? formatRange(found.q ?? found.qLow, found.q ?? found.qHigh) : "no dip";
      };
      return [
        { label: "Without phase", value: of(scalar(sweep)) },
        { label: "With phase", value: of(sweep) },
      ];
    },
  ),
};
