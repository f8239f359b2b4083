import { dips, type Model, type Point, points } from "./model.ts";

/** A file with a trouble of its own, and the truth that a reader must find in it. */
export interface Fixture {
  file: string;
  trouble: string;
  bytes: Uint8Array;
  model: Model;
  truth: Truth;
}

export interface Truth {
  file: string;
  about: string;
  start_mhz: number;
  stop_mhz: number;
  points: number;
  quantity: string;
  dips: ReturnType<typeof dips>;
  zero_db_at?: number;
  reference_ohm?: number;
}

export interface Make {
  model: Model;
  quantity: string;
  zeroDb?: number;
  /** Points that a reader must report, where the file has fewer or more rows than the model. */
  points?: number;
  encode?: (text: string) => Uint8Array;
}

/** The truth's dips are those seen from 50 Ω, whatever the file is referred to. */
const FINDINGS_OHM = 50;

/** Builds a fixture from the points of its model. */
export function fixture(
  file: string,
  trouble: string,
  make: Make,
  text: (points: Point[]) => string,
): Fixture {
  const { model, quantity, zeroDb } = make;
  const truth: Truth = {
    file,
    about: `Invented data. ${trouble}`,
    start_mhz: model.startMhz,
    stop_mhz: model.stopMhz,
    points: make.points ?? model.points,
    quantity,
    dips: dips({ ...model, referenceOhm: FINDINGS_OHM }),
  };
  if (zeroDb !== undefined) truth.zero_db_at = zeroDb;
  if (model.referenceOhm !== 50) truth.reference_ohm = model.referenceOhm;
  return { file, trouble, model, bytes: (make.encode ?? utf8)(text(points(model))), truth };
}

export const utf8 = (text: string) => new TextEncoder().encode(text);
export const withBom = (text: string) => utf8(`\ufeff${text}`);
export const latin1 = (text: string) => Uint8Array.from(text, (c) => c.charCodeAt(0));

export function utf16(text: string, { big = false, bom = true } = {}): Uint8Array {
  const marked = bom ? `\ufeff${text}` : text;
  const bytes = new Uint8Array(marked.length * 2);
  for (let i = 0; i < marked.length; i++)
    new DataView(bytes.buffer).setUint16(2 * i, marked.charCodeAt(i), !big);
  return bytes;
}

/** Lines joined with a line end after each. */
export const lines = (all: string[], end = "\n") => all.map((line) => line + end).join("");

/** A number with a decimal comma. */
export const comma = (value: number, digits: number) => value.toFixed(digits).replace(".", ",");

/** A whole number with a mark between its groups of three. */
export const grouped = (value: number, mark: string) => value.toFixed(0).replace(/\B(?=(\d{3})+$)/g, mark);
