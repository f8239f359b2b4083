/** The band ribbon under a frequency axis: allocations and design bands, and the dips that hang off it. */
import type { FrequencyScale } from "./axis.ts";
import type { ChartBand, ChartDip } from "./chart-types.ts";
import { assignTiers } from "./tiers.ts";

export interface RibbonBand {
  name: string;
  fraction: number;
  widthFraction: number;
  design: boolean;
  /** Narrowest tier with room for its name; null where it has none anywhere. */
  tier: number | null;
}

/** How far a dip hangs off the ribbon: outside the design bands, or outside every band. */
export type Hang = "outside-design" | "outside-all";

const NAME_CHARACTER_PX = 7;

/** The bands that touch the view, design bands last so that they lie on top. */
export function ribbonBands(
  scale: FrequencyScale,
  bands: readonly ChartBand[],
  designBands: readonly ChartBand[],
  plotWidthsPx?: readonly number[],
): RibbonBand[] {
  const seen = [
    ...bands.map((band) => ({ band, design: false })),
    ...designBands.map((band) => ({ band, design: true })),
  ].filter(({ band }) => band.highHz >= scale.fromHz && band.lowHz <= scale.toHz);
  const items = seen.map(({ band, design }) => {
    const from = Math.max(0, scale.fractionOf(band.lowHz));
    const to = Math.min(1, scale.fractionOf(band.highHz));
    return { name: band.name, fraction: from, widthFraction: to - from, design };
  });
  const designNames = new Set(designBands.map((band) => band.name));
  const named = items.filter((item) => item.design || !designNames.has(item.name));
  const tiers = assignTiers(
    named.map((item) => ({
      fraction: item.fraction + item.widthFraction / 2,
      widthPx: item.name.length * NAME_CHARACTER_PX,
      priority: (item.design ? 0 : 1) - item.widthFraction,
    })),
    plotWidthsPx,
  );
  // A design band that bears an allocation's name says it once.
  return items.map((item) => ({ ...item, tier: tiers[named.indexOf(item)] ?? null }));
}

export function hangOf(
  dip: ChartDip,
  bands: readonly ChartBand[],
  designBands: readonly ChartBand[],
): Hang | null {
  const inside = (band: ChartBand) => dip.frequencyHz >= band.lowHz && dip.frequencyHz <= band.highHz;
  if (dip.inDesignBand === true) return null;
  if (bands.length + designBands.length > 0 && !bands.some(inside) && !designBands.some(inside)) {
    return "outside-all";
  }
  return dip.inDesignBand === false ? "outside-design" : null;
}
