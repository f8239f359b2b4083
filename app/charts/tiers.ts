/**
 * Which labels are shown at which width. A page drawn on the server does not know how wide it will be, so
 * every label gets the narrowest tier at which it fits and the style sheet hides it below that
 * (`.tier-1` under 640 px, `.tier-2` under 1000 px of the chart's box).
 */

/** Widths of the plot in px at which each tier begins to hold; index = tier. */
export const TIER_PLOT_WIDTHS_PX = [240, 568, 928] as const;

export interface LabelPlace {
  /** Middle of the label, 0 to 1 of the plot's width. */
  fraction: number;
  widthPx: number;
  /** Lower is placed first. */
  priority: number;
}

/** The tier of each label, in the given order; null where it fits at no width. */
export function assignTiers(
  labels: readonly LabelPlace[],
  plotWidthsPx: readonly number[] = TIER_PLOT_WIDTHS_PX,
  gapPx = 8,
): (number | null)[] {
  const tiers: (number | null)[] = labels.map(() => null);
  const order = labels.map((_, index) => index).sort((a, b) => labels[a].priority - labels[b].priority);
  for (const [tier, plotWidthPx] of plotWidthsPx.entries()) {
    const taken = order.filter((index) => tiers[index] !== null);
    for (const index of order) {
      if (tiers[index] !== null) continue;
      const free = taken.every((other) => clear(labels[index], labels[other], plotWidthPx, gapPx));
      if (!free) continue;
      tiers[index] = tier;
      taken.push(index);
    }
  }
  return tiers;
}

function clear(a: LabelPlace, b: LabelPlace, plotWidthPx: number, gapPx: number): boolean {
  return Math.abs(a.fraction - b.fraction) * plotWidthPx >= (a.widthPx + b.widthPx) / 2 + gapPx;
}
