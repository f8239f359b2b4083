import { slopeQ } from "~/measurement/complex/slope-q";
import { type Definition, example } from "../definition";
import { exampleSweep } from "../example-sweep";

export const qSlope: Definition = {
  id: "q-slope",
  title: "Q from the slope of the impedance",
  says: "With phase, Q follows from how fast R and X change with frequency, without asking where the band ends. The slopes are those of parabolas by least squares through the samples near the dip, each weighed by what the noise makes of its impedance.",
  formulas: [
    String.raw`Q \approx \frac{f_0}{2R}\sqrt{\left(\frac{\mathrm{d}R}{\mathrm{d}f}\right)^2+\left(\frac{\mathrm{d}X}{\mathrm{d}f}+\frac{|X|}{f_0}\right)^2}`,
    String.raw`\sigma_Z = \sigma_\Gamma\,\frac{2 Z_0}{|1-\Gamma|^2}`,
  ],
  source:
    "A. D. Yaghjian and S. R. Best, IEEE Trans. Antennas Propag. 53(4), 1298–1324, 2005; within 0.7 % of the fitted Q on ten NEC-2 antennas.",
  limits:
    "The antenna's Q only at the antenna and for one resonance. Where the slope changes within the dip the interval is wide, and from half of Q on it is told as unknown.",
  example: example(
    [
      { name: "r", label: "Resistance at resonance", unit: "Ω", value: 36, least: 1, most: 2000 },
      { name: "q", label: "True Q", value: 12, least: 2, most: 1000 },
      { name: "noise", label: "Noise", unit: "dB", value: 0.05, least: 0, most: 1 },
      { name: "points", label: "Points in the sweep", value: 201, least: 11, most: 2001, whole: true },
    ],
    ({ r, q, noise, points }) => {
      const sweep = exampleSweep({ resistanceOhm: r, q, frequencyHz: 14.15e6, points, noiseDb: noise });
      const found = slopeQ(sweep, 14.15e6);
      if (!found) return [{ label: "Q by slope", value: "unknown" }];
      return [
        { label: "Q by slope", value: `${found.q.toPrecision(4)} ± ${found.halfWidth.toPrecision(1)}` },
        { label: "Samples used", value: String(found.points) },
      ];
    },
  ),
};
