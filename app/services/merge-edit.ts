/** Two people may have had the same form open: only what a person changed is written, over nobody else's change. */

type Value = string | number | null;

export interface Merged<V extends object> {
  /** What to write. */
  changes: Partial<V>;
  /** What somebody else changed in the meantime to something else: write nothing and ask. */
  conflicts: (keyof V & string)[];
}

/**
 * @param was as the form was filled in when it was opened; a field that it lacks counts as changed
 * @param now as it is stored
 * @param wanted as the form was sent
 */
export function mergeEdit<V extends Record<string, Value>>(was: Partial<V>, now: V, wanted: V): Merged<V> {
  const merged: Merged<V> = { changes: {}, conflicts: [] };
  for (const key of Object.keys(wanted) as (keyof V & string)[]) {
    const before = was[key];
    if (before === wanted[key] || now[key] === wanted[key]) continue;
    if (before !== undefined && now[key] !== before) merged.conflicts.push(key);
    else merged.changes[key] = wanted[key];
  }
  return merged;
}

/** The question to the later of two people, as `<EditConflict>` asks it: `text` gives each value as its form sends it. */
export function conflictOf<V extends Record<string, Value>>(
  now: V,
  wanted: V,
  { changes, conflicts }: Merged<V>,
  text: (value: Value) => string = (value) => String(value ?? ""),
) {
  const settled = Object.entries({ ...now, ...changes }) as [keyof V & string, Value][];
  return {
    asked: conflicts.map((name) => ({ name, mine: text(wanted[name]), theirs: text(now[name]) })),
    rest: Object.fromEntries(
      settled.flatMap(([name, value]) => (conflicts.includes(name) ? [] : [[name, text(value)]])),
    ),
    was: JSON.stringify(now),
  };
}

/** What a hidden field says of how the form was filled in; nothing where it says nothing that makes sense. */
export function parseWas<V extends object>(text: unknown): Partial<V> {
  try {
    const value = JSON.parse(String(text));
    return typeof value === "object" && value !== null ? value : {};
  } catch {
    return {};
  }
}
