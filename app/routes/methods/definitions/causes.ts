import { NO_ANTENNA } from "~/measurement/antenna";
import { causesOf } from "~/measurement/causes";
import { type Definition, example } from "../definition";
import { elementOf } from "./elements";

export const causes: Definition = {
  id: "causes",
  title: "Causes of a dip",
  says: "The antenna's parts, odd multiples of the other dips, the feedline's ripple and the bench's own sweeps each predict frequencies. A dip's causes are ranked by how far off they are against their own tolerance and by how crowded their predictions lie, always as “may be”, each with its arithmetic and the measurement that would tell it apart.",
  formulas: [
    String.raw`\text{score} = \ln\frac{t_5(z)/\tau}{1/\Delta},\qquad z=\frac{f_\mathrm{dip}-f_\mathrm{predicted}}{\tau}`,
  ],
  source:
    "Own rule; how often the first cause is right is measured on NEC-2 models with one part taken away.",
  limits:
    "A cause is a proposal. What nobody wrote down (a gutter, a neighbour's mast) is in no list; a verdict is for people.",
  example: example(
    [
      { name: "mhz", label: "Dip at", unit: "MHz", value: 31.2, least: 0.5, most: 500 },
      { name: "vertical", label: "Vertical", unit: "m", value: 10.1, least: 0.5, most: 100 },
      { name: "mast", label: "Mast beside it", unit: "m", value: 7.1, least: 0.5, most: 100 },
    ],
    ({ mhz, vertical, mast }) => {
      const antenna = { ...NO_ANTENNA, elements: [elementOf("vertical", vertical), elementOf("mast", mast)] };
      const found = causesOf(
        { frequencyHz: mhz * 1e6 },
        { antenna, dips: [{ frequencyHz: mhz * 1e6 }], ripplePeriodHz: null, references: [] },
      );
      if (found.length === 0) return [{ label: "Causes", value: "nothing that is known explains it" }];
      return found.slice(0, 4).map(({ title, arithmetic }) => ({ label: title, value: arithmetic }));
    },
  ),
};
