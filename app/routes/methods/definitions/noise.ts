import { noiseDb } from "~/measurement/noise";
import { formatNoise } from "~/measurement/units";
import { type Definition, example } from "../definition";
import { exampleSweep } from "../example-sweep";

export const noise: Definition = {
  id: "noise",
  title: "Noise of a sweep",
  says: "The scatter of neighbouring points, in dB of return loss, as one standard deviation. It comes from differences of neighbours, in which the land's own slope is gone, and from their median, which a few dips do not move.",
  formulas: [
    String.raw`\sigma = \frac{\operatorname{median}|d_i-\operatorname{median} d|}{0.6745\,\sqrt{6}},\qquad d_i = y_{i-1}-2y_i+y_{i+1}`,
  ],
  source:
    "F. Stoehr et al., “DER_SNR”, Astronomical Data Analysis Software and Systems XVII, ASP Conf. Ser. 394, 2008 (from memory, not seen); fourth and sixth differences likewise, of which the least counts.",
  limits:
    "It sees what changes from point to point: a drift, a ripple or the bench's own errors are no noise, and are part of the bench's limits.",
  example: example(
    [
      { name: "noise", label: "Noise put in", unit: "dB", value: 0.2, least: 0, most: 3 },
      { name: "points", label: "Points", value: 401, least: 20, most: 4001, whole: true },
    ],
    ({ noise, points }) => {
      const sweep = exampleSweep({ resistanceOhm: 40, q: 12, frequencyHz: 14.15e6, points, noiseDb: noise });
      return [{ label: "Noise found", value: formatNoise(noiseDb(sweep.magnitude)) }];
    },
  ),
};
