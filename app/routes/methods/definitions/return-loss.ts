import { gammaToReflectedPower, gammaToReturnLossDb } from "~/measurement/reflection";
import { formatDb, formatPercent } from "~/measurement/units";
import { type Definition, example } from "../definition";

export const returnLoss: Definition = {
  id: "return-loss",
  title: "Return loss and reflected power",
  says: "How far below what was sent the returning wave is. It is positive for anything passive; files that write S11 in dB carry the same number with the other sign, and a reading says which it took.",
  formulas: [
    String.raw`\mathrm{RL} = -20\,\log_{10}|\Gamma|\ \mathrm{dB}`,
    String.raw`\frac{P_\mathrm{back}}{P_\mathrm{sent}} = |\Gamma|^2`,
  ],
  source:
    "T. S. Bird, “Definition and misuse of return loss”, IEEE Antennas and Propagation Magazine 51(2), 166–167, 2009.",
  limits:
    "A negative return loss means that more came back than was sent: noise or calibration. Such points are kept and marked; they have no SWR.",
  example: example([{ name: "gamma", label: "abs Γ", value: 0.2, least: 0, most: 1.2 }], ({ gamma }) => [
    { label: "Return loss", value: formatDb(gammaToReturnLossDb(gamma), 0.01) },
    { label: "Reflected power", value: formatPercent(gammaToReflectedPower(gamma)) },
  ]),
};
