import { z } from "zod";
import { type Antenna, type AntennaElement, ELEMENT_KINDS, NO_ANTENNA } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";
import type { AntennaForm } from "./antenna.schema";
import { lengthInField } from "./sizes";

/** What a row of the form holds, as text. */
export type FieldTexts<Name extends string> = Partial<Record<Name, string>>;
export type ElementTexts = FieldTexts<
  | "key"
  | "kind"
  | "name"
  | "length"
  | "count"
  | "height"
  | "diameter"
  | "material"
  | "insulated"
  | "where"
  | "remove"
>;

export interface AntennaTexts {
  elements: ElementTexts[];
  feedline: FieldTexts<"cable" | "length" | "velocityFactor" | "route">;
  choke: FieldTexts<"turns" | "core" | "where">;
  ground: string;
  remarks: string;
}

/** The form as it was sent, with what is not of the antenna itself. */
export type SentAntenna = AntennaTexts & { since: string; remark: string; was: string };

/** What is wrong with each field, by its name; the empty name is the whole form. */
export type FieldErrors = Record<string, string[] | null>;

/** The antenna as the form's fields show it. */
export function textsOf(antenna: Antenna, unit: LengthUnit): AntennaTexts {
  const { feedline, choke } = antenna;
  return {
    elements: antenna.elements.map((element) => ({
      key: element.key,
      kind: element.kind,
      name: element.name,
      length: lengthInField(element.lengthM, unit),
      count: String(element.count),
      height: lengthInField(element.heightM, unit),
      diameter: numberText(element.diameterMm),
      material: element.material,
      insulated: element.insulated === null ? "" : element.insulated ? "yes" : "no",
      where: element.where,
    })),
    feedline: {
      cable: feedline?.cable ?? "",
      length: lengthInField(feedline?.lengthM ?? null, unit),
      velocityFactor: numberText(feedline?.velocityFactor ?? null),
      route: feedline?.route ?? "",
    },
    choke: { turns: numberText(choke?.turns ?? null), core: choke?.core ?? "", where: choke?.where ?? "" },
    ground: antenna.ground,
    remarks: antenna.remarks,
  };
}

/** The fields as they were sent, so that nothing that was typed is lost. */
export function sentTexts(payload: Record<string, unknown>): SentAntenna {
  const sent = payload as unknown as Partial<SentAntenna>;
  return {
    elements: Array.isArray(sent.elements) ? sent.elements.map((row) => row ?? {}) : [],
    feedline: sent.feedline ?? {},
    choke: sent.choke ?? {},
    ground: String(sent.ground ?? ""),
    remarks: String(sent.remarks ?? ""),
    since: String(sent.since ?? ""),
    remark: String(sent.remark ?? ""),
    was: String(sent.was ?? ""),
  };
}

/**
 * The antenna that a form asks for. A length that shows as it did before is the length it was: showing it rounds.
 * `newKey` names the elements that are new.
 */
export function antennaFrom(
  form: AntennaForm,
  was: Antenna,
  unit: LengthUnit,
  newKey: () => string,
): Antenna {
  const same = (now: number | null, before: number | null | undefined) =>
    before !== undefined && lengthInField(now, unit) === lengthInField(before, unit) ? before : now;
  const feedline = form.feedline;
  return {
    elements: form.elements.flatMap((row): AntennaElement[] => {
      if (!row.kind || row.remove) return [];
      const before = was.elements.find(({ key }) => key === row.key);
      return [
        {
          key: row.key ?? newKey(),
          kind: row.kind,
          name: row.name,
          lengthM: same(row.length.value, before?.lengthM),
          count: row.count ?? 1,
          heightM: same(row.height.value, before?.heightM),
          diameterMm: row.diameter,
          material: row.material,
          insulated: row.insulated === undefined ? null : row.insulated === "yes",
          where: row.where,
        },
      ];
    }),
    feedline: feedline
      ? {
          cable: feedline.cable || null,
          lengthM: same(feedline.length.value, was.feedline?.lengthM),
          velocityFactor: feedline.velocityFactor,
          route: feedline.route,
        }
      : null,
    choke: form.choke ? { ...form.choke } : null,
    ground: form.ground,
    remarks: form.remarks,
  };
}

/** The antenna that a hidden field carries; an empty one where it carries none. */
export function parseAntenna(text: string | undefined): Antenna {
  try {
    return antennaShape.parse(JSON.parse(text ?? ""));
  } catch {
    return NO_ANTENNA;
  }
}

function numberText(value: number | null): string {
  return value === null ? "" : String(Number(value.toPrecision(6)));
}

const number = z.number().nullable();
const antennaShape = z.object({
  elements: z.array(
    z.object({
      key: z.string(),
      kind: z.enum(ELEMENT_KINDS),
      name: z.string(),
      lengthM: number,
      count: z.number(),
      heightM: number,
      diameterMm: number,
      material: z.string(),
      insulated: z.boolean().nullable(),
      where: z.string(),
    }),
  ),
  feedline: z
    .object({ cable: z.string().nullable(), lengthM: number, velocityFactor: number, route: z.string() })
    .nullable(),
  choke: z.object({ turns: number, core: z.string(), where: z.string() }).nullable(),
  ground: z.string(),
  remarks: z.string(),
});
