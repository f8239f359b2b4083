/** A local minimum of abs Γ that stands out. */
export interface FoundDip {
  /**
   * Index of the lowest sample; of a plateau its middle (rounded down); of an edge dip the first or last
   * finite one.
   */
  index: number;
  /** Depth in dB of return loss below the lower of its two crests. Infinity where abs Γ is 0. */
  prominenceDb: number;
  /**
   * Lowest on the first or last point of the sweep or beside a gap. Its prominence counts the one side
   * there is.
   */
  edge: boolean;
}

/**
 * Dips of abs Γ with a prominence of at least `minimumProminenceDb` dB of return loss, ascending by index.
 *
 * `magnitude`: abs Γ, linear. NaN splits the sweep into stretches that know nothing of each other. A point
 * with abs Γ over 1 never is a dip, but counts as a crest. Fewer than two finite points in a row: no dip.
 *
 * The prominence is that of topography, as `scipy.signal.peak_prominences` has it on return loss: from the
 * dip outwards to the first strictly deeper sample or the end, the crest of each side, the lower crest
 * counts. As return loss falls steadily with abs Γ, crests and dips are compared as ratios of abs Γ and no
 * logarithm is taken in the loop. One pass with a stack of the minima that still wait for a deeper one on
 * their right, ascending in value: O(n).
 */
export function findDips(magnitude: Float64Array, minimumProminenceDb: number): FoundDip[] {
  const found: FoundDip[] = [];
  const stack = new Waiting(10 ** (minimumProminenceDb / 20), found);
  const n = magnitude.length;
  let i = 0;
  while (i < n) {
    while (i < n && Number.isNaN(magnitude[i])) i++;
    if (i < n) i = scanStretch(magnitude, i, stack);
  }
  return found.sort((a, b) => a.index - b.index);
}

/** Walks one stretch without gaps from `start`; returns the index after it. */
function scanStretch(magnitude: Float64Array, start: number, stack: Waiting): number {
  const n = magnitude.length;
  stack.size = 0;
  let value = magnitude[start];
  /** Start of the run of equal values that the walk is in; -1 while it rises. */
  let runStart = start;
  let crest = 0;
  let i = start + 1;
  while (i < n) {
    let next = magnitude[i];
    if (next > value) {
      if (runStart >= 0) {
        if (runStart === start) stack.push(start, value, 0, true);
        else stack.push((runStart + i - 1) >> 1, value, crest, false);
        runStart = -1;
      }
      do {
        value = next;
        next = ++i < n ? magnitude[i] : Number.NaN;
      } while (next > value);
    } else if (next < value) {
      if (runStart < 0 || runStart === start) crest = value;
      do {
        value = next;
        next = ++i < n ? magnitude[i] : Number.NaN;
      } while (next < value);
      runStart = i - 1;
    } else if (next === value) i++;
    else break;
  }
  if (runStart < 0) stack.close(value);
  else {
    if (runStart !== start) stack.push(i - 1, value, crest, true);
    stack.close(0);
  }
  return i;
}

/** The minima whose right side is still open, from the deepest (bottom) to the shallowest (top). */
class Waiting {
  size = 0;
  private index = new Float64Array(FIRST_ROOM);
  private value = new Float64Array(FIRST_ROOM);
  private left = new Float64Array(FIRST_ROOM);
  private right = new Float64Array(FIRST_ROOM);
  private isEdge = new Uint8Array(FIRST_ROOM);
  private ratio: number;
  private found: FoundDip[];

  constructor(ratio: number, found: FoundDip[]) {
    this.ratio = ratio;
    this.found = found;
  }

  /**
   * A new minimum with the highest sample since the one before it. A last point is an edge with a left
   * crest.
   */
  push(index: number, value: number, crest: number, edge: boolean): void {
    let left = this.popAbove(value, crest);
    const top = this.size - 1;
    if (top >= 0) {
      if (left > this.right[top]) this.right[top] = left;
      if (this.value[top] === value && this.left[top] > left) left = this.left[top];
    }
    if (this.size === this.index.length) this.grow();
    const at = this.size++;
    this.index[at] = index;
    this.value[at] = value;
    this.left[at] = left;
    this.right[at] = 0;
    this.isEdge[at] = edge ? 1 : 0;
  }

  /** The stretch ends on a crest, or (0) on a last point that was pushed. */
  close(crest: number): void {
    this.popAbove(Number.NEGATIVE_INFINITY, crest);
  }

  /**
   * Takes off all minima above `value`; returns the highest crest on the way. What lies between a minimum
   * and the one below it was noted as the lower one's right crest when the upper one came, so only right
   * crests are carried down.
   */
  private popAbove(value: number, crest: number): number {
    let right = crest;
    let highest = crest;
    while (this.size > 0 && this.value[this.size - 1] > value) {
      const top = --this.size;
      if (this.right[top] > right) right = this.right[top];
      this.record(top, right);
      if (this.left[top] > highest) highest = this.left[top];
    }
    return Math.max(right, highest);
  }

  private record(at: number, right: number): void {
    const value = this.value[at];
    const left = this.left[at];
    const edge = this.isEdge[at] === 1;
    const crest = edge ? Math.max(left, right) : Math.min(left, right);
    if (crest < this.ratio * value * SLACK || value > 1 || crest <= value) return;
    this.found.push({ index: this.index[at], prominenceDb: 20 * Math.log10(crest / value), edge });
  }

  private grow(): void {
    const room = this.index.length * 4;
    this.index = widen(this.index, room);
    this.value = widen(this.value, room);
    this.left = widen(this.left, room);
    this.right = widen(this.right, room);
    const flags = new Uint8Array(room);
    flags.set(this.isEdge);
    this.isEdge = flags;
  }
}

function widen(values: Float64Array, room: number): Float64Array<ArrayBuffer> {
  const wider = new Float64Array(room);
  wider.set(values);
  return wider;
}

const FIRST_ROOM = 1024;
/** A prominence that equals the asked one counts, whatever the last bits of the ratio are. */
const SLACK = 1 - 1e-12;
