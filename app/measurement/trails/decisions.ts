/** What people decided about pairs of dips, brought into agreement with itself. */

export interface TrailDecision {
  kind: "same" | "apart";
  /** Ids of two dips, in any order; a dip that no sweep has any more still joins others. */
  a: string;
  b: string;
}

export interface Agreed {
  /** The dips that are one with this one, itself among them. */
  groupOf: (id: string) => ReadonlySet<string>;
  /** True where a decision keeps the two on different trails. */
  isApart: (a: string, b: string) => boolean;
  /** Decisions that a newer one contradicts, or that would put two dips of one sweep on one trail. */
  overruled: TrailDecision[];
}

/**
 * `decisions` oldest first; the newest outrank. `sweepOf` names a dip's sweep, undefined where it has none any more.
 * "Same" is transitive; "apart" holds between all that is the same as either.
 */
export function agree(
  decisions: readonly TrailDecision[],
  sweepOf: (id: string) => string | undefined,
): Agreed {
  const groups = new Map<string, Set<string>>();
  const apart: [string, string][] = [];
  const groupOf = (id: string) => groups.get(id) ?? new Set([id]);
  const isApart = (a: string, b: string) => {
    const [one, two] = [groupOf(a), groupOf(b)];
    return apart.some(([x, y]) => (one.has(x) && two.has(y)) || (one.has(y) && two.has(x)));
  };
  const overruled: TrailDecision[] = [];
  for (const decision of [...decisions].reverse()) {
    const { a, b, kind } = decision;
    const together = groupOf(a).has(b);
    if (kind === "apart") {
      if (together) overruled.push(decision);
      else apart.push([a, b]);
      continue;
    }
    if (together) continue;
    const joined = new Set([...groupOf(a), ...groupOf(b)]);
    if (isApart(a, b) || sharesSweep(joined, sweepOf)) {
      overruled.push(decision);
      continue;
    }
    for (const id of joined) groups.set(id, joined);
  }
  return { groupOf, isApart, overruled };
}

/**
 * The decisions that remain when the dip `gone` is deleted: A = B and B = C become A = C, A = B and B ≠ C become
 * A ≠ C. Those that do not name it stay as they are, in their order; a new one stands where the later of its two stood.
 */
export function withoutDip<D extends TrailDecision>(decisions: readonly D[], gone: string): D[] {
  const kept: D[] = [];
  for (const [index, later] of decisions.entries()) {
    const far = otherOf(later, gone);
    if (far === null) {
      kept.push(later);
      continue;
    }
    for (const earlier of decisions.slice(0, index)) {
      const near = otherOf(earlier, gone);
      if (near === null || near === far) continue;
      if (later.kind === "apart" && earlier.kind === "apart") continue;
      const same = later.kind === "same" && earlier.kind === "same";
      kept.push({ ...later, kind: same ? "same" : "apart", a: near, b: far });
    }
  }
  return kept;
}

function otherOf({ a, b }: TrailDecision, one: string): string | null {
  if (a === one) return b;
  return b === one ? a : null;
}

function sharesSweep(ids: ReadonlySet<string>, sweepOf: (id: string) => string | undefined): boolean {
  const seen = new Set<string>();
  for (const id of ids) {
    const sweep = sweepOf(id);
    if (sweep === undefined) continue;
    if (seen.has(sweep)) return true;
    seen.add(sweep);
  }
  return false;
}
