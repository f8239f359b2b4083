import { gammaToMismatchLossDb, gammaToReflectedPower, swrToGamma } from "~/measurement/reflection";
import { formatPercent } from "~/measurement/units";
import { type Definition, example, plain } from "../definition";

export const mismatchLoss: Definition = {
  id: "mismatch-loss",
  title: "Mismatch loss",
  says: "What is not taken by the load because it returns, in dB, when the source is matched to the reference.",
  formulas: [String.raw`\mathrm{ML} = -10\,\log_{10}\left(1-|\Gamma|^2\right)\ \mathrm{dB}`],
  source:
    "M/A-COM, “VSWR, return loss and transmission loss vs. transmitted power” (handbook page 10-4); the values there agree.",
  limits:
    "A transmitter with a tuner sends the returning wave out again, so this is no loss of transmitted power then; loss in the feedline is another thing: see “Feedline”.",
  example: example([{ name: "swr", label: "SWR", value: 2, least: 1, most: 1000 }], ({ swr }) => [
    { label: "Mismatch loss", value: `${plain(gammaToMismatchLossDb(swrToGamma(swr)), 3)} dB` },
    { label: "Reflected power", value: formatPercent(gammaToReflectedPower(swrToGamma(swr))) },
  ]),
};
