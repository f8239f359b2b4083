import { findTrails } from "~/measurement/trails";
import { type Definition, example } from "../definition";

export const trails: Definition = {
  id: "trails",
  title: "Trails",
  says: "Dips of sweeps that follow one another are paired by the least total distance in log frequency within a gate; depth and width are weak evidence. What finds no partner begins or ends a trail. A person's correction is kept and outranks the pairing for ever.",
  formulas: [String.raw`\min_\pi \sum_i \left|\ln\frac{g_{\pi(i)}}{f_i}\right|`],
  source:
    "The assignment problem, H. W. Kuhn, Naval Research Logistics Quarterly 2, 83–97, 1955 (from memory, not seen); the gate and the weights are own rules, measured on generated histories.",
  limits:
    "Two dips that cross look like two that turn back: correct them by hand. A trail waits through a few sweeps that do not show it.",
  example: example(
    [
      { name: "first", label: "First dip", unit: "MHz", value: 7.1, least: 0.1, most: 1000 },
      { name: "second", label: "Second dip", unit: "MHz", value: 10.2, least: 0.1, most: 1000 },
      { name: "then", label: "After the step", unit: "MHz", value: 7.35, least: 0.1, most: 1000 },
      { name: "also", label: "and", unit: "MHz", value: 14.6, least: 0.1, most: 1000 },
    ],
    ({ first, second, then, also }) => {
      const range = { startHz: 0.05e6, stopHz: 1500e6 };
      const { trails: found } = findTrails([
        { id: "before", ...range, dips: [first, second].map(dipAt("before")) },
        { id: "after", ...range, dips: [then, also].map(dipAt("after")) },
      ]);
      return found.map(({ stops }, i) => ({
        label: `Trail ${i + 1}`,
        value:
          stops.length === 2
            ? `${mhz(stops[0].dip.frequencyHz)} became ${mhz(stops[1].dip.frequencyHz)}`
            : `${mhz(stops[0].dip.frequencyHz)}, ${stops[0].sweepIndex === 0 ? "not found again" : "new"}`,
      }));
    },
  ),
};

function dipAt(sweep: string) {
  return (at: number, i: number) => ({
    id: `${sweep}-${i}`,
    frequencyHz: at * 1e6,
    returnLossDb: 18,
    widthHz: null,
  });
}

function mhz(hz: number): string {
  return `${Number((hz / 1e6).toPrecision(6))} MHz`;
}
