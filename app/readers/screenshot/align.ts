/** Pixels within which labels must miss their lines alike, and the share of labels that must do so. */
const AGREEMENT = 1.5;
const LEAST_AGREEING = 0.4;

/**
 * Moves labels onto the lines that they belong to.
 *
 * A label's middle misses its line by a little that is the same for all labels of an axis: where lines
 * are near, their places are taken; the other labels are moved by the usual miss. Same order and length.
 */
export function alignToLines<T extends { position: number }>(
  labels: T[],
  lines: number[],
  reach: number,
): T[] {
  const nearest = labels.map((label) => {
    let best: number | null = null;
    for (const line of lines) {
      const d = line - label.position;
      if (Math.abs(d) <= reach && (best === null || Math.abs(d) < Math.abs(best))) best = d;
    }
    return best;
  });
  const misses = nearest.filter((d) => d !== null).sort((a, b) => a - b);
  const usual = misses[Math.floor(misses.length / 2)] ?? 0;
  const agreeing = misses.filter((d) => Math.abs(d - usual) <= AGREEMENT).length;
  if (agreeing < Math.max(2, LEAST_AGREEING * labels.length)) return labels;
  return labels.map((label, i) => {
    const d = nearest[i];
    const move = d !== null && Math.abs(d - usual) <= AGREEMENT ? d : usual;
    return { ...label, position: label.position + move };
  });
}
