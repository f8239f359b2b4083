import type { Conflict } from "~/components/edit-conflict/EditConflict";
import type { Antenna } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";
import { type ChangedEntry, withEntries } from "~/services/antenna-changes";
import { elementName, entryLabel, KIND_WORDS } from "~/services/antenna-words";
import { textsOf } from "./antenna-form";

interface TwoAntennas {
  /** As the later of two people sent it. */
  wanted: Antenna;
  /** As it is stored. */
  now: Antenna;
  /** Both, with the conflicting entries as they are stored. */
  merged: Antenna;
  conflicts: readonly ChangedEntry[];
  unit: LengthUnit;
  /** The fields of the form that are not of the antenna. */
  others: Record<string, string>;
}

export interface AntennaQuestion {
  conflict: Conflict;
  /** What each field asked about is called. */
  labels: Record<string, string>;
}

/**
 * The question to the later of two who changed one antenna, in the fields of its form. A part that one of them took down
 * while the other changed it is asked about as a whole.
 */
export function antennaConflict({
  wanted,
  now,
  merged,
  conflicts,
  unit,
  others,
}: TwoAntennas): AntennaQuestion {
  const parts = new Set(conflicts.map(({ path }) => path.split(".")[0]));
  const has = (antenna: Antenna, part: string) => antenna.elements.some(({ key }) => key === part);
  const elementOf = (antenna: Antenna, part: string) => antenna.elements.filter(({ key }) => key === part);
  const halfGone = [...parts].filter((part) => has(wanted, part) !== has(now, part));
  const kept = merged.elements.filter(({ key }) => !halfGone.includes(key));
  const back = halfGone.flatMap((part) => [...elementOf(wanted, part), ...elementOf(now, part)]);
  const whole = { ...merged, elements: [...kept, ...back] };
  const paths = conflicts.map(({ path }) => path).filter((path) => !halfGone.includes(path.split(".")[0]));
  const theirs = fieldsOf(whole, unit);
  const mine = fieldsOf(withEntries(whole, wanted, paths), unit);
  const labels = labelsOf(whole, wanted, now);
  const asked = Object.keys(theirs)
    .filter((name) => mine[name] !== theirs[name])
    .map((name) => ({ name, mine: mine[name] ?? "", theirs: theirs[name] }));
  const gone = halfGone.map((part) => {
    const name = `elements[${whole.elements.findIndex(({ key }) => key === part)}].remove`;
    labels[name] = `${elementName(part, wanted, now)}, stays or is taken down`;
    const word = (antenna: Antenna) => (has(antenna, part) ? "" : "on");
    return { name, mine: word(wanted), theirs: word(now) };
  });
  const asks = [...asked, ...gone];
  const rest = Object.entries(theirs).filter(([name]) => !asks.some((one) => one.name === name));
  return {
    conflict: { asked: asks, rest: { ...Object.fromEntries(rest), ...others }, was: JSON.stringify(now) },
    labels,
  };
}

/** A value as a person reads it; not said is "". */
export function antennaWords(name: string, value: string): string {
  if (name.endsWith(".remove")) return value ? "taken down" : "stays";
  if (name.endsWith(".kind")) return KIND_WORDS[value as keyof typeof KIND_WORDS] ?? value;
  return value;
}

/** Every field of the form by its name. */
function fieldsOf(antenna: Antenna, unit: LengthUnit): Record<string, string> {
  const { elements, feedline, choke, ground, remarks } = textsOf(antenna, unit);
  const named = (prefix: string, texts: object) =>
    Object.entries(texts).map(([field, text]) => [`${prefix}.${field}`, String(text)]);
  return Object.fromEntries([
    ...elements.flatMap((row, i) => named(`elements[${i}]`, row)),
    ...named("feedline", feedline),
    ...named("choke", choke),
    ["ground", ground],
    ["remarks", remarks],
  ]);
}

function labelsOf(whole: Antenna, ...antennas: Antenna[]): Record<string, string> {
  return Object.fromEntries(
    Object.keys(fieldsOf(whole, "metres")).map((name) => {
      const [, index, field] = /^elements\[(\d+)\]\.(\w+)$/.exec(name) ?? [];
      const path = index ? `${whole.elements[Number(index)].key}.${ENTRY[field] ?? field}` : name;
      return [name, entryLabel(path.replace(/^(feedline)\.length$/, "$1.lengthM"), ...antennas, whole)];
    }),
  );
}

/** Fields of the form that are called otherwise where they are stored. */
const ENTRY: Partial<Record<string, string>> = {
  length: "lengthM",
  height: "heightM",
  diameter: "diameterMm",
};
