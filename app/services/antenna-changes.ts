/** The antenna taken apart into single entries, so that changes can be told, merged and carried on. */
import {
  type Antenna,
  type AntennaElement,
  ELEMENT_KINDS,
  type QuantityTarget,
  type StepQuantity,
} from "../measurement/antenna.ts";
import { mergeEdit } from "./merge-edit.ts";

type Entry = string | number | null;
/** Entries by path, e.g. `a1b2.lengthM`, `feedline.cable`; null is "not said". An element that is not there has none. */
export type Entries = Record<string, Entry>;

export interface ChangedEntry {
  path: string;
  was: Entry;
  now: Entry;
}

export function entriesOf(antenna: Antenna): Entries {
  const entries: Entries = {};
  for (const { key, ...element } of antenna.elements) {
    for (const field of ELEMENT_FIELDS) entries[`${key}.${field}`] = told(element[field]);
  }
  for (const field of FEEDLINE_FIELDS) entries[`feedline.${field}`] = told(antenna.feedline?.[field]);
  for (const field of CHOKE_FIELDS) entries[`choke.${field}`] = told(antenna.choke?.[field]);
  entries.ground = told(antenna.ground);
  entries.remarks = told(antenna.remarks);
  return entries;
}

/** What differs, in the order of the later antenna, with what is gone behind it. */
export function changesBetween(was: Antenna, now: Antenna): ChangedEntry[] {
  const [before, after] = [entriesOf(was), entriesOf(now)];
  return pathsOf(after, before)
    .map((path) => ({ path, was: before[path] ?? null, now: after[path] ?? null }))
    .filter((change) => change.was !== change.now);
}

export interface MergedAntenna {
  antenna: Antenna;
  /** Where both changed the same entry, each to something else: nothing of it was taken. */
  conflicts: ChangedEntry[];
}

/** Takes what changed from `was` to `wanted` over to `now`, and nothing else. */
export function mergeAntenna(was: Antenna, now: Antenna, wanted: Antenna): MergedAntenna {
  const [before, stored, sent] = [entriesOf(was), entriesOf(now), entriesOf(wanted)];
  const paths = pathsOf(sent, stored, before);
  const filled = (entries: Entries) => Object.fromEntries(paths.map((path) => [path, entries[path] ?? null]));
  const { changes, conflicts } = mergeEdit<Entries>(filled(before), filled(stored), filled(sent));
  return {
    antenna: antennaOf({ ...filled(stored), ...changes } as Entries),
    conflicts: conflicts.map((path) => ({ path, was: stored[path] ?? null, now: sent[path] ?? null })),
  };
}

/**
 * Lets a change made in the past run on through the versions that came after it, each entry until one of them changed
 * it for itself. Answers the later versions as they are then.
 */
export function carryOn(was: Antenna, now: Antenna, later: readonly Antenna[]): Antenna[] {
  const open = new Map(changesBetween(was, now).map((change) => [change.path, change]));
  return later.map((antenna) => {
    const entries = entriesOf(antenna);
    for (const [path, change] of open) {
      if ((entries[path] ?? null) === change.was) entries[path] = change.now;
      else open.delete(path);
    }
    return antennaOf(entries);
  });
}

/** The antenna after a step: each quantity with a target is put where it points. */
export function applyQuantities(antenna: Antenna, quantities: readonly StepQuantity[]): Antenna {
  const entries = entriesOf(antenna);
  for (const { target, to } of quantities) {
    if (target) entries[pathOf(target)] = target.field === "count" ? Math.max(1, Math.round(to ?? 1)) : to;
  }
  return antennaOf(entries);
}

/** `antenna` with some entries as `other` has them. */
export function withEntries(antenna: Antenna, other: Antenna, paths: readonly string[]): Antenna {
  const from = entriesOf(other);
  return antennaOf({
    ...entriesOf(antenna),
    ...Object.fromEntries(paths.map((path) => [path, from[path] ?? null])),
  });
}

/** What the antenna says there now; undefined where it has no such part. */
export function entryAt(antenna: Antenna, target: QuantityTarget): Entry | undefined {
  return entriesOf(antenna)[pathOf(target)];
}

export function pathOf({ part, field }: QuantityTarget): string {
  return `${part}.${field}`;
}

/** Whole again; an element without a kind is none, a feedline or a choke of which nothing is said neither. */
function antennaOf(entries: Entries): Antenna {
  const text = (path: string) => String(entries[path] ?? "");
  const number = (path: string) => (typeof entries[path] === "number" ? (entries[path] as number) : null);
  const isSaid = (part: string, fields: readonly string[]) =>
    fields.some((field) => (entries[`${part}.${field}`] ?? null) !== null);
  const keys = [
    ...new Set(Object.keys(entries).flatMap((path) => /^(?!feedline|choke)(.+)\./.exec(path)?.[1] ?? [])),
  ];
  return {
    elements: keys.flatMap((key): AntennaElement[] => {
      const kind = ELEMENT_KINDS.find((one) => one === entries[`${key}.kind`]);
      if (!kind) return [];
      return [
        {
          key,
          kind,
          name: text(`${key}.name`),
          lengthM: number(`${key}.lengthM`),
          count: number(`${key}.count`) ?? 1,
          heightM: number(`${key}.heightM`),
          diameterMm: number(`${key}.diameterMm`),
          material: text(`${key}.material`),
          insulated: entries[`${key}.insulated`] === null ? null : entries[`${key}.insulated`] === "yes",
          where: text(`${key}.where`),
        },
      ];
    }),
    feedline: isSaid("feedline", FEEDLINE_FIELDS)
      ? {
          cable: text("feedline.cable") || null,
          lengthM: number("feedline.lengthM"),
          velocityFactor: number("feedline.velocityFactor"),
          route: text("feedline.route"),
        }
      : null,
    choke: isSaid("choke", CHOKE_FIELDS)
      ? { turns: number("choke.turns"), core: text("choke.core"), where: text("choke.where") }
      : null,
    ground: text("ground"),
    remarks: text("remarks"),
  };
}

function told(value: string | number | boolean | null | undefined): Entry {
  if (typeof value === "boolean") return value ? "yes" : "no";
  return value === undefined || value === "" ? null : value;
}

function pathsOf(...all: Entries[]): string[] {
  return [...new Set(all.flatMap((entries) => Object.keys(entries)))];
}

const ELEMENT_FIELDS = [
  "kind",
  "name",
  "lengthM",
  "count",
  "heightM",
  "diameterMm",
  "material",
  "insulated",
  "where",
] as const;
const FEEDLINE_FIELDS = ["cable", "lengthM", "velocityFactor", "route"] as const;
const CHOKE_FIELDS = ["turns", "core", "where"] as const;
