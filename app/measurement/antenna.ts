/**
 * The shape of an antenna and what stands around it, in SI units (metre), as the causes of dips need it. Null is
 * "not said", never zero.
 */

export const ELEMENT_KINDS = ["vertical", "dipole", "loop", "wire", "radial", "mast", "guy"] as const;
export type ElementKind = (typeof ELEMENT_KINDS)[number];

/** A conductor: what radiates by intent, and what may take part without it. */
export interface AntennaElement {
  /** Lasting within the project, so that a step can point at it. */
  key: string;
  kind: ElementKind;
  name: string;
  /** Metres, end to end; for a loop its circumference. */
  lengthM: number | null;
  /** How many alike, e.g. radials. At least 1. */
  count: number;
  /** Metres above ground of the feed or the middle. */
  heightM: number | null;
  diameterMm: number | null;
  material: string;
  insulated: boolean | null;
  /** Where it is and how it runs, in words. */
  where: string;
}

export interface AntennaFeedline {
  /** Name in the cable table or of the project's own entry; null where it is not said. */
  cable: string | null;
  lengthM: number | null;
  /** Null: as the cable's sheet says. */
  velocityFactor: number | null;
  route: string;
}

export interface AntennaChoke {
  turns: number | null;
  core: string;
  where: string;
}

export interface Antenna {
  elements: AntennaElement[];
  feedline: AntennaFeedline | null;
  choke: AntennaChoke | null;
  ground: string;
  remarks: string;
}

export const NO_ANTENNA: Antenna = { elements: [], feedline: null, choke: null, ground: "", remarks: "" };

/** What a step can point at: a number of an element, of the feedline or of the choke. */
export type AntennaField = "lengthM" | "heightM" | "count" | "diameterMm" | "turns";

export interface QuantityTarget {
  /** An element's key, "feedline" or "choke". */
  part: string;
  field: AntennaField;
}

/** A measured quantity that a step changed. Numbers in `unit`; with a target in that field's own unit. */
export interface StepQuantity {
  label: string;
  /** "m", "mm", "turns", or anything a person writes. */
  unit: string;
  from: number | null;
  to: number | null;
  target: QuantityTarget | null;
}

/** Where a planned step should put a trail. */
export interface ExpectedPlace {
  /** The trail's public id. */
  trail: string;
  frequencyHz: number;
  /** The interval's ends, Hz; null where it is not known. */
  lowHz: number | null;
  highHz: number | null;
  /** How it was reckoned, with its arithmetic, in one line. */
  how: string;
}
