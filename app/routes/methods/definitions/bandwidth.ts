import { analyse } from "~/measurement/analyse";
import { formatFrequency, formatPercent, formatWidth } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep, scalar } from "../example-sweep";

export const bandwidth: Definition = {
  id: "bandwidth",
  title: "Bandwidth",
  says: "The contiguous stretch around a dip in which the SWR is at or under a limit, 2 at first. A dip that never gets there has none, which is not zero. Where the sweep ends inside, that edge is open and the width is “at least”. Two dips in one stretch share it, and both say so.",
  formulas: [
    String.raw`u_s^2 = \frac{(r+1)^2 g^2-(r-1)^2}{1-g^2},\quad g=\frac{s-1}{s+1},\qquad f_2-f_1 = \frac{f_0\,u_s}{r\,Q}`,
    String.raw`\mathrm{FBW} = \frac{f_2-f_1}{\sqrt{f_1 f_2}}`,
  ],
  source:
    "Closed form of the series resonator (own derivation; same form in H. F. Pues and A. R. Van de Capelle, IEEE Trans. Antennas Propag. 37(11), 1989, from memory, not seen).",
  limits:
    "Edges come from the fitted resonator where one fits, else between the two samples around the limit: by Γ where there is phase, by abs Γ where not. 10 dB of return loss is another limit (SWR 1.925).",
  example: example(
    [
      { name: "r", label: "Resistance at resonance", unit: "Ω", value: 50, least: 5, most: 500 },
      { name: "q", label: "Q", value: 12, least: 2, most: 300 },
      { name: "limit", label: "SWR limit", value: 2, least: 1.01, most: 20 },
    ],
    ({ r, q, limit }) => {
      const sweep = scalar(exampleSweep({ resistanceOhm: r, q, frequencyHz: 14.15e6, points: 201 }));
      const found = analyse(sweep, { swrLimit: limit }).dips.find(({ edge }) => !edge);
      const band = found?.bandwidth;
      const closed = closedWidthHz(r / 50, q, limit);
      return [
        {
          label: "Width",
          value: band
            ? `${band.open ? "at least " : ""}${formatWidth(band.widthHz)}`
            : "none: the limit is not reached",
        },
        {
          label: "Edges",
          value: band
            ? [band.lowHz, band.highHz]
                .map((hz) => (hz === null ? "sweep ends" : formatFrequency(hz)))
                .join(" to ")
            : "none",
        },
        { label: "Of the centre", value: band ? formatPercent(band.fractional) : "none" },
        { label: "By the closed form", value: closed === null ? "none" : formatWidth(closed) },
      ];
    },
  ),
};

function closedWidthHz(r: number, q: number, limit: number): number | null {
  const g = (limit - 1) / (limit + 1);
  const square = ((r + 1) ** 2 * g * g - (r - 1) ** 2) / (1 - g * g);
  return square > 0 ? (14.15e6 * Math.sqrt(square)) / (r * q) : null;
}
