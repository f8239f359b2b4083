/** Where the cards of the dips stand: as near under their dips as they can without overlapping. */

export interface CardPlace {
  /** Left edge and width, 0 to 1 of the plot's width. */
  left: number;
  width: number;
  /** Where the leader meets the card: straight under the dip where the card reaches that far. */
  anchor: number;
}

export const MOST_CARDS = 6;
const WIDEST_CARD = 0.21;
/** On a narrow plot few cards may be wider. */
const WIDEST_CLOSE_CARD = 0.32;
/** More cards than this need a wide plot to stand under their dips. */
export const MOST_CLOSE_CARDS = 4;
const GAP = 0.012;
/** How far from the card's corner a leader may arrive, as a share of the card. */
const CORNER_SHARE = 0.08;

/**
 * Places one card per dip, in the dips' order from left to right, moving each as little as possible
 * (least squares, by pooling neighbours that press on each other).
 * @param fractions ascending positions of the dips, 0 to 1; at most `MOST_CARDS`
 * @param close for a narrow plot: the cards take more of it
 */
export function placeCards(fractions: readonly number[], close = false): CardPlace[] {
  const count = fractions.length;
  if (count === 0) return [];
  const width = Math.min(close ? WIDEST_CLOSE_CARD : WIDEST_CARD, (1 - GAP * (count - 1)) / count);
  const pitch = width + GAP;
  const room = 1 - width;
  // Less its place in the row, each card's wish must not fall: then neighbours are at least a pitch apart.
  const wishes = fractions.map((fraction, index) => fraction - width / 2 - index * pitch);
  const lefts = pool(wishes).map((wish, index) => {
    const leastLeft = index * pitch;
    const mostLeft = room - (count - 1 - index) * pitch;
    return Math.min(Math.max(wish + index * pitch, leastLeft), Math.max(leastLeft, mostLeft));
  });
  return lefts.map((left, index) => {
    const margin = width * CORNER_SHARE;
    const anchor = Math.min(Math.max(fractions[index], left + margin), left + width - margin);
    return { left, width, anchor };
  });
}

/** The nearest non-falling sequence, by least squares (pool adjacent violators). */
function pool(values: readonly number[]): number[] {
  const blocks: { mean: number; count: number }[] = [];
  for (const value of values) {
    let block = { mean: value, count: 1 };
    while (blocks.length > 0 && blocks[blocks.length - 1].mean > block.mean) {
      const before = blocks.pop() as { mean: number; count: number };
      const count = before.count + block.count;
      block = { mean: (before.mean * before.count + block.mean * block.count) / count, count };
    }
    blocks.push(block);
  }
  return blocks.flatMap(({ mean, count }) => Array<number>(count).fill(mean));
}

export interface Weighed {
  noteCount: number;
  verdict: "open" | "proposed" | "settled";
  inDesignBand: boolean | null;
  prominenceDb: number;
}

/**
 * The dips that get a card when there are more than fit: what is in or beside the question first
 * (design bands, notes, unsettled), then the deepest. Keeps the order given.
 */
export function chooseTelling<D extends Weighed>(
  dips: readonly D[],
  most = MOST_CARDS,
): { told: D[]; rest: D[] } {
  const ranked = dips.map((dip, index) => ({ index, weight: weigh(dip) }));
  ranked.sort((a, b) => b.weight - a.weight || a.index - b.index);
  const chosen = new Set(ranked.slice(0, most).map(({ index }) => index));
  return {
    told: dips.filter((_, index) => chosen.has(index)),
    rest: dips.filter((_, index) => !chosen.has(index)),
  };
}

function weigh(dip: Weighed): number {
  const asked = Math.min(dip.noteCount, 5) * 4;
  const design = dip.inDesignBand === true ? 12 : 0;
  const unsettled = dip.verdict === "settled" ? 0 : 4;
  return asked + design + unsettled + Math.min(dip.prominenceDb, 40) * 0.5;
}
