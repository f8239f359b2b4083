import { type AntennaElement, ELEMENT_KINDS, type ElementKind, NO_ANTENNA } from "~/measurement/antenna";
import { predictionsOf } from "~/measurement/elements";
import { choice, type Definition, example } from "../definition";

export const elements: Definition = {
  id: "elements",
  title: "Where a part may resonate",
  says: "A wire grounded at one end resonates near odd multiples of a quarter wave, one free at both ends or fed in its middle near half waves, a loop near whole waves. k says how much shorter or longer than in free space, with its usual range.",
  formulas: [
    String.raw`f_n = \frac{n\,k\,c}{4L}\ (n\ \text{odd}),\qquad f_n = \frac{n\,k\,c}{2L},\qquad f_n = \frac{n\,k\,c}{L}`,
    String.raw`k_n = 1-\frac{1-k_1}{n}`,
  ],
  source:
    "Handbook lengths 234/f and 468/f feet (on-the-numbers.co.uk/useful-info.html), 1005/f feet for loops and the long-wire rule (ARRL Antenna Book; from memory, not seen).",
  limits:
    "Thickness, insulation, ground and neighbours move it by several per cent; each prediction carries its range, and parts without a length make none.",
  example: example(
    [
      choice("kind", "Kind", ELEMENT_KINDS),
      { name: "length", label: "Length", unit: "m", value: 5.07, least: 0.05, most: 500 },
      { name: "upto", label: "Up to", unit: "MHz", value: 60, least: 1, most: 1000 },
    ],
    ({ kind, length, upto }) => {
      const found = predictionsOf(
        { ...NO_ANTENNA, elements: [elementOf(ELEMENT_KINDS[kind], length)] },
        upto * 1e6,
      );
      if (found.length === 0) return [{ label: "Up to there", value: "none" }];
      return found.slice(0, MOST).map(({ what, arithmetic }) => ({ label: what, value: arithmetic }));
    },
  ),
};

export function elementOf(kind: ElementKind, lengthM: number): AntennaElement {
  return {
    key: kind,
    kind,
    name: `the ${kind}`,
    lengthM,
    count: 1,
    heightM: null,
    diameterMm: null,
    material: "",
    insulated: null,
    where: "",
  };
}

const MOST = 6;
