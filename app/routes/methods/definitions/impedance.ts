import { formatDegrees, formatImpedance } from "~/measurement/complex/format";
import { gammaToImpedance, gammaToSwr } from "~/measurement/reflection";
import { formatSwr } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const impedance: Definition = {
  id: "impedance",
  title: "Impedance and the plane of Γ",
  says: "With phase, Γ is a point in the plane: its distance from the middle is abs Γ, its angle that of the returning wave. Each point stands for one impedance; points of the same resistance lie on a circle, and so do points of the same reactance.",
  formulas: [
    String.raw`Z = Z_0\,\frac{1+\Gamma}{1-\Gamma},\qquad \Gamma = \frac{Z-Z_0}{Z+Z_0}`,
    String.raw`\left|\Gamma-\frac{r}{1+r}\right| = \frac{1}{1+r},\qquad \left|\Gamma-1-\frac{\mathrm{j}}{x}\right| = \frac{1}{|x|}`,
  ],
  source:
    "P. H. Smith, “Transmission line calculator”, Electronics 12(1), 29–31, 1939 (from memory, not seen).",
  limits:
    "It is the impedance at the plane of the sweep. A length of line between it and the antenna turns Γ clockwise and shrinks it. The angle is followed without jumps as long as neighbours lie less than half a turn apart.",
  example: example(
    [
      { name: "gamma", label: "abs Γ", value: 0.5, least: 0, most: 0.999 },
      { name: "angle", label: "Angle of Γ", unit: "°", value: 60, least: -360, most: 360 },
      { name: "reference", label: "Reference", unit: "Ω", value: 50, least: 1, most: 1000 },
    ],
    ({ gamma, angle, reference }) => {
      const radians = (angle * Math.PI) / 180;
      const z = gammaToImpedance({ re: gamma * Math.cos(radians), im: gamma * Math.sin(radians) }, reference);
      return [
        { label: "Impedance", value: formatImpedance(z) },
        { label: "SWR", value: formatSwr(gammaToSwr(gamma)) },
        { label: "Angle of Z", value: formatDegrees((Math.atan2(z.im, z.re) * 180) / Math.PI) },
      ];
    },
  ),
};
