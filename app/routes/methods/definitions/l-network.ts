import { formatElement, formatImpedance } from "~/measurement/complex/format";
import { lNetworks, singleElements } from "~/measurement/complex/l-network";
import { formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const lNetwork: Definition = {
  id: "l-network",
  title: "Matching with one or two elements",
  says: "One element takes the reactance (in series) or the susceptance (across) away. Two, one in series and one across, bring any load of positive resistance to the reference at one frequency: with the shunt element at the load where G ≤ 1/Z0, with the series element at the load where R ≤ Z0, each in two ways.",
  formulas: [
    String.raw`b=\pm\sqrt{\tfrac{G}{Z_0}-G^2},\quad B_p=b-B,\quad X_s=\frac{b Z_0}{G}`,
    String.raw`X_s=\pm\sqrt{R(Z_0-R)}-X,\quad B_p=\pm\frac{1}{Z_0}\sqrt{\frac{Z_0-R}{R}}`,
    String.raw`L=\frac{X}{2\pi f},\quad C=\frac{1}{2\pi f\,|X|}`,
  ],
  source:
    "D. M. Pozar, Microwave Engineering, section 5.1 (from memory, not seen); each result is checked by reckoning back what the port sees, thousands of random loads in the tests.",
  limits:
    "Ideal elements at one frequency. Real coils lose power, and under power voltages and currents are high: use parts rated for it, in a box, and never touch or tune them while transmitting.",
  example: example(
    [
      { name: "r", label: "Resistance", unit: "Ω", value: 20, least: 0.1, most: 1e4 },
      { name: "x", label: "Reactance", unit: "Ω", value: -60, least: -1e4, most: 1e4 },
      { name: "mhz", label: "Frequency", unit: "MHz", value: 14.1, least: 0.01, most: 3000 },
    ],
    ({ r, x, mhz }) => {
      const load = { re: r, im: x };
      const singles = singleElements(load, 50, mhz * 1e6).map(({ element, swr }) => ({
        label: element.place === "series" ? "One in series" : "One across",
        value: `${formatElement(element)}, SWR ${formatSwr(swr)}`,
      }));
      const pairs = lNetworks(load, 50, mhz * 1e6).map(({ elements, input }) => ({
        label: "From the port",
        value: `${elements.map((one) => `${one.place === "series" ? "series" : "across"} ${formatElement(one)}`).join(", then ")}: ${formatImpedance(input)}`,
      }));
      return singles.length + pairs.length === 0
        ? [{ label: "Elements", value: "none: it is matched" }]
        : [...singles, ...pairs];
    },
  ),
};
