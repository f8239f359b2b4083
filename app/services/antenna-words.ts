/** The antenna's entries in words. */
import type { Antenna, ElementKind } from "../measurement/antenna.ts";
import { formatLength, type LengthUnit } from "../measurement/lengths.ts";
import { type ChangedEntry, changesBetween } from "./antenna-changes.ts";

export const KIND_WORDS: Record<ElementKind, string> = {
  vertical: "vertical",
  dipole: "dipole",
  loop: "loop",
  wire: "wire",
  radial: "radial",
  mast: "mast",
  guy: "guy",
};

/** "Reed pole, length": the part by its name and what of it. */
export function entryLabel(path: string, ...antennas: Antenna[]): string {
  const { part, field } = split(path);
  const words = FIELD_WORDS[field] ?? field;
  if (part === null) return words;
  if (part === "feedline" || part === "choke") return `${part}, ${words}`;
  return `${elementName(part, ...antennas)}, ${words}`;
}

export function entryText(path: string, value: string | number | null, unit: LengthUnit): string {
  const { field } = split(path);
  if (value === null) return "not said";
  if (typeof value === "string")
    return field === "kind" ? (KIND_WORDS[value as ElementKind] ?? value) : value;
  if (field === "lengthM" || field === "heightM") return formatLength(value, unit);
  if (field === "diameterMm") return `${Number(value.toPrecision(4))}\u2009mm`;
  return String(Number(value.toPrecision(6)));
}

function changeText(change: ChangedEntry, unit: LengthUnit, ...antennas: Antenna[]): string {
  const { path, was, now } = change;
  const label = entryLabel(path, ...antennas);
  if (isProse(path)) return now === null ? `${label} removed` : `${label} written`;
  return `${label}: ${entryText(path, was, unit)} → ${entryText(path, now, unit)}`;
}

/** What a version changed, a line each; an element that came or went is one line. */
export function changesInWords(was: Antenna, now: Antenna, unit: LengthUnit): string[] {
  const keysOf = (antenna: Antenna) => antenna.elements.map(({ key }) => key);
  const [before, after] = [keysOf(was), keysOf(now)];
  const came = after.filter((key) => !before.includes(key));
  const gone = before.filter((key) => !after.includes(key));
  const whole = new Set([...came, ...gone]);
  if (before.length === 0 && after.length > 1 && was.feedline === null && !was.ground) {
    return [`described: ${after.map((key) => elementName(key, now)).join(", ")}`];
  }
  return [
    ...came.map((key) => `${elementName(key, now)} added${lengthOf(key, now, unit)}`),
    ...gone.map((key) => `${elementName(key, was)} removed`),
    ...changesBetween(was, now)
      .filter(({ path }) => !whole.has(split(path).part ?? ""))
      .map((change) => changeText(change, unit, now, was)),
  ];
}

/** A name to speak of it, even where nobody gave one. */
export function elementName(key: string, ...antennas: Antenna[]): string {
  for (const antenna of antennas) {
    const element = antenna.elements.find((one) => one.key === key);
    if (element) return element.name || KIND_WORDS[element.kind];
  }
  return "a part";
}

function lengthOf(key: string, antenna: Antenna, unit: LengthUnit): string {
  const lengthM = antenna.elements.find((one) => one.key === key)?.lengthM ?? null;
  return lengthM === null ? "" : `, ${formatLength(lengthM, unit)}`;
}

function split(path: string): { part: string | null; field: string } {
  const dot = path.lastIndexOf(".");
  return dot < 0 ? { part: null, field: path } : { part: path.slice(0, dot), field: path.slice(dot + 1) };
}

function isProse(path: string): boolean {
  return /^(ground|remarks)$|\.(where|route)$/.test(path);
}

const FIELD_WORDS: Record<string, string> = {
  kind: "kind",
  name: "name",
  lengthM: "length",
  count: "count",
  heightM: "height",
  diameterMm: "diameter",
  material: "material",
  insulated: "insulated",
  where: "where it runs",
  cable: "cable",
  velocityFactor: "velocity factor",
  route: "route",
  turns: "turns",
  core: "core",
  ground: "ground",
  remarks: "remarks",
};
