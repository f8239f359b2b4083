import { formatLength, formatLengthChange } from "~/measurement/lengths";
import { trimByProportion, trimTo } from "~/measurement/trim";
import { type Definition, example } from "../definition";

export const trim: Definition = {
  id: "trim",
  title: "Trim: what length to cut to",
  says: "From one sweep, the length in proportion to the frequency. From two or more steps that changed one length, the line through log f against log L, with its interval: it knows how much of the frequency that length really decides.",
  formulas: [
    String.raw`L_\mathrm{new} = L\,\frac{f_\mathrm{measured}}{f_\mathrm{wanted}}`,
    String.raw`\ln f = a + s\,\ln L,\qquad L_\mathrm{new} = e^{(\ln f_\mathrm{wanted}-a)/s}`,
  ],
  source:
    "Handbook lengths go with 1/f (ARRL Antenna Book; from memory, not seen); proved on NEC-2 antennas that were cut and run again.",
  limits:
    "Cut less than it says and sweep again: wire comes off more easily than on. Far from the lengths that were tried the line is a guess, and says so. Keep wires away from power lines while you work on them.",
  example: example(
    [
      { name: "first", label: "Length at first", unit: "m", value: 10.3, least: 0.05, most: 500 },
      { name: "firstMhz", label: "Dip then", unit: "MHz", value: 6.9, least: 0.1, most: 1000 },
      { name: "now", label: "Length now", unit: "m", value: 10.1, least: 0.05, most: 500 },
      { name: "nowMhz", label: "Dip now", unit: "MHz", value: 7.02, least: 0.1, most: 1000 },
      { name: "wanted", label: "Wanted", unit: "MHz", value: 7.1, least: 0.1, most: 1000 },
    ],
    ({ first, firstMhz, now, nowMhz, wanted }) => {
      const pairs = [
        { lengthM: first, frequencyHz: firstMhz * 1e6 },
        { lengthM: now, frequencyHz: nowMhz * 1e6 },
      ];
      const [all, last] = [trimTo(pairs, wanted * 1e6), trimByProportion(pairs[1], wanted * 1e6)];
      return [
        {
          label: all?.method === "line" ? "By the line" : "In proportion: the two pairs make no line",
          value: all ? `${formatLength(all.lengthM)} (${formatLengthChange(all.changeM)})` : "unknown",
        },
        { label: "In proportion", value: last ? formatLength(last.lengthM) : "unknown" },
        { label: "Arithmetic", value: all?.how ?? "unknown" },
      ];
    },
  ),
};
