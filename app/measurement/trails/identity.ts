/** Trails are found anew whenever a sweep comes or goes; what they are called is kept. */

export interface StoredTrail {
  id: number;
  dipIds: readonly string[];
  /** Somebody named it or gave it a verdict: it is not thrown away. */
  cared: boolean;
}

export interface Identities {
  /** For each found trail the stored one that it is, null for a new one. */
  idOf: (number | null)[];
  /** Stored ones that no found trail is: to be kept where `cared`, else to go. */
  left: StoredTrail[];
}

/**
 * Each found trail (its dips' ids) is the stored one with which it shares most dips; no stored one is given twice. Those
 * that somebody cared for choose first, then the larger share, then the older one, then the earlier found one.
 */
export function keepIdentities(
  found: readonly (readonly string[])[],
  stored: readonly StoredTrail[],
): Identities {
  const ownerOf = new Map(stored.flatMap((trail) => trail.dipIds.map((dip) => [dip, trail] as const)));
  const shares: { index: number; trail: StoredTrail; shared: number }[] = [];
  for (const [index, dipIds] of found.entries()) {
    const counts = new Map<StoredTrail, number>();
    for (const dip of dipIds) {
      const trail = ownerOf.get(dip);
      if (trail) counts.set(trail, (counts.get(trail) ?? 0) + 1);
    }
    for (const [trail, shared] of counts) shares.push({ index, trail, shared });
  }
  shares.sort(
    (a, b) =>
      Number(b.trail.cared) - Number(a.trail.cared) ||
      b.shared - a.shared ||
      a.trail.id - b.trail.id ||
      a.index - b.index,
  );
  const idOf: (number | null)[] = found.map(() => null);
  const given = new Set<StoredTrail>();
  for (const { index, trail } of shares) {
    if (idOf[index] !== null || given.has(trail)) continue;
    idOf[index] = trail.id;
    given.add(trail);
  }
  return { idOf, left: stored.filter((trail) => !given.has(trail)) };
}
