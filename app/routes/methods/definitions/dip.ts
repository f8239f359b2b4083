import { analyse } from "~/measurement/analyse";
import { formatDb, formatFrequency } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep, scalar } from "../example-sweep";

export const dip: Definition = {
  id: "dip",
  title: "Dip",
  says: "A place where abs Γ is lower than on both sides and that stands out: its prominence, the depth in dB below the lower of its two crests, is at least a setting (3 dB at first) and at least six times the noise. Lowest on the first or last point it is an edge dip: shown, without fitted numbers.",
  formulas: [
    String.raw`p = \min(\mathrm{RL}_\mathrm{dip}-\mathrm{RL}_\mathrm{left},\ \mathrm{RL}_\mathrm{dip}-\mathrm{RL}_\mathrm{right}) \ge \max(p_\mathrm{set},\ 6\,\sigma)`,
  ],
  source:
    "Prominence as in topography and in scipy.signal.peak_prominences, against which it is tested; the six σ are a rule of this product.",
  limits:
    "A gap ends the land: no dip reaches across one. Two resonances nearer than their widths make one dip.",
  example: example(
    [
      { name: "r", label: "Resistance at resonance", unit: "Ω", value: 40, least: 1, most: 2000 },
      { name: "prominence", label: "Least prominence", unit: "dB", value: 3, least: 0.1, most: 40 },
      { name: "noise", label: "Noise", unit: "dB", value: 0.1, least: 0, most: 5 },
    ],
    ({ r, prominence, noise }) => {
      const sweep = scalar(
        exampleSweep({ resistanceOhm: r, q: 12, frequencyHz: 14.15e6, points: 201, noiseDb: noise }),
      );
      const { dips, noiseDb } = analyse(sweep, { minimumProminenceDb: prominence });
      return [
        { label: "A dip must stand out by", value: formatDb(Math.max(prominence, 6 * noiseDb)) },
        {
          label: "Dips found",
          value:
            dips.length === 0
              ? "none"
              : dips.map((one) => formatFrequency(one.frequencyHz, one.frequencyUncertaintyHz)).join(", "),
        },
        { label: "Prominence", value: dips.length === 0 ? "none" : formatDb(dips[0].prominenceDb) },
      ];
    },
  ),
};
