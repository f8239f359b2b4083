import { allowedError } from "~/measurement/correction/wish";
import { gammaToReturnLossDb } from "~/measurement/reflection";
import { formatDb } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const knownSwr: Definition = {
  id: "known-swr",
  title: "Range in which a bench knows an SWR",
  says: "A bench page says over which frequencies a chosen SWR is known to a chosen tolerance, 1.5 to ±0.1 at first, and in plain words what limits it. The wish is met where both limits of that SWR lie within the tolerance.",
  formulas: [
    String.raw`\varepsilon = \min\bigl(\rho(s+t)-\rho(s),\ \rho(s)-\rho(s-t)\bigr),\qquad \rho(s)=\frac{s-1}{s+1}`,
  ],
  source: "Follows from the limits above; own rule.",
  limits: "With tracking and match errors besides, more directivity is needed than the example says.",
  example: example(
    [
      { name: "swr", label: "SWR", value: 1.5, least: 1, most: 20 },
      { name: "tolerance", label: "Known to ±", value: 0.1, least: 0.001, most: 5 },
    ],
    ({ swr, tolerance }) => [
      { label: "Directivity needed", value: formatDb(gammaToReturnLossDb(allowedError({ swr, tolerance }))) },
    ],
  ),
};
