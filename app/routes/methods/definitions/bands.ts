import { bandAt, bandSources, type ItuRegion } from "~/measurement/bands";
import { formatFrequency } from "~/measurement/units";
import { choice, type Definition, example } from "../definition";

export const bands: Definition = {
  id: "bands",
  title: "Bands",
  says: "Amateur allocations by ITU region, as labels under every frequency axis; a project's own design bands stand over them. Per design band the page tells the SWR at both edges and in the middle, and the share of the band under the limit.",
  formulas: [
    String.raw`\text{share} = \frac{1}{f_2-f_1}\int_{f_1}^{f_2}\left[\mathrm{SWR}(f)\le s\right]\mathrm{d}f`,
  ],
  source: "The IARU band plans of the three regions; the example names the one it used.",
  limits:
    "National limits differ, and only they decide. A dip outside your bands is a finding, not a permission: transmit only where your licence and local rules allow.",
  example: example(
    [
      choice("region", "Region", ["not chosen", "1", "2", "3"]),
      { name: "mhz", label: "Frequency", unit: "MHz", value: 7.25, least: 0.01, most: 3000 },
    ],
    ({ region, mhz }) => {
      const chosen = region === 0 ? null : (region as ItuRegion);
      const band = bandAt(chosen, mhz * 1e6);
      return [
        { label: "Band", value: band ? band.name : "none" },
        {
          label: "Edges",
          value: band ? `${formatFrequency(band.lowHz)} to ${formatFrequency(band.highHz)}` : "none",
        },
        { label: "Remark", value: band?.remark ?? "none" },
        {
          label: "Source",
          value: bandSources(chosen)
            .map(({ title, date }) => `${title}, ${date}`)
            .join("; "),
        },
      ];
    },
  ),
};
