import type { FrequencyUnit, Quantity, Sweep, Warning } from "../measurement/sweep.ts";

/** How bytes become a sweep. Kept beside the file, editable, repeatable. */

export type FileFormat = "text" | "touchstone" | "screenshot";

/** What the columns of a text file hold; finer than `Quantity`. */
export const TEXT_QUANTITIES = [
  "s11-db",
  "return-loss",
  "swr",
  "level",
  "magnitude",
  "magnitude-angle",
  "db-angle",
  "real-imaginary",
  "resistance-reactance",
  "impedance-angle",
] as const;
export type TextQuantity = (typeof TEXT_QUANTITIES)[number];

export const TEXT_ENCODINGS = ["utf-8", "utf-16le", "utf-16be", "latin1"] as const;

/** Every choice that a reading of delimited text rests on. Columns count from 0, lines from 1. */
export interface TextSpec {
  encoding: (typeof TEXT_ENCODINGS)[number];
  delimiter: "," | ";" | "\t" | " ";
  decimal: "." | ",";
  thousands: "" | "." | "," | " " | "'";
  /** Line of the column headings; 0 where there are none. */
  headerLine: number;
  firstDataLine: number;
  frequencyColumn: number;
  frequencyUnit: FrequencyUnit;
  valueColumn: number;
  /** Angle, imaginary part or reactance; null for one-column quantities. */
  secondColumn: number | null;
  quantity: TextQuantity;
  angleUnit: "deg" | "rad";
  referenceOhm: number;
  /** Level that counts as full reflection, dB; null while it is not known. Only for levels. */
  zeroDb: number | null;
}

/** The choices of a Touchstone reading that are not in the file itself. */
export interface TouchstoneSpec {
  /** Which reflection of a file with several ports: 1 for S11, 2 for S22, … */
  port: number;
  /** Ω to which Γ is converted, through the impedance; null to keep the file's own reference. */
  referenceOhm: number | null;
}

/** A place in a picture; pixel centres are at whole numbers. */
export interface PicturePoint {
  x: number;
  y: number;
}

/** A stretch of pixel columns that was misread, both ends included. */
export interface MaskedStretch {
  fromX: number;
  toX: number;
  /** With both, only ink between these rows is passed over; without, the columns become gaps. */
  top?: number;
  bottom?: number;
}

/** The choices of a picture's reading; filled by `readers/screenshot`. */
export interface ScreenshotSpec {
  frame?: { left: number; top: number; right: number; bottom: number };
  /** The plot's corners in a photograph of a screen: top left, top right, bottom right, bottom left; in place of `frame`. */
  corners?: PicturePoint[];
  /** In pixels of the picture; with `corners` in pixels of the plot laid flat. */
  masked?: MaskedStretch[];
  /** Colour of a trace in the same picture that is the 0 dB line, for levels; in place of `zeroDb`. */
  zeroTrace?: string;
  startHz?: number;
  stopHz?: number;
  scale?: "linear" | "log";
  top?: number;
  bottom?: number;
  quantity?: "s11-db" | "return-loss" | "swr" | "level";
  zeroDb?: number;
  traceColor?: string;
  referenceOhm?: number;
}

/** What a person or a script has fixed; all else is found in the file. */
export interface Given {
  /** Of a text file, when no finer `text.quantity` is given: the best reading of this quantity. */
  quantity?: Quantity;
  text?: Partial<TextSpec>;
  touchstone?: Partial<TouchstoneSpec>;
  screenshot?: ScreenshotSpec;
}

export interface Choice {
  value: string;
  label: string;
}

/** Something the file leaves open. `proposed` was used; a person may choose another. */
export interface Question {
  /** "trace" | "port" | "quantity" | "frequency-unit" | "zero-db" | … */
  id: string;
  text: string;
  choices: Choice[];
  proposed: string | null;
}

export type AxisSource = "printed" | "given" | "assumed";

/** What was seen in a picture when it was read, for the page that shows the reading. */
export interface PictureNotes {
  width: number;
  height: number;
  sources: Record<"startHz" | "stopHz" | "scale" | "top" | "bottom" | "quantity", AxisSource> | null;
  /** 0 to 1 and in words, stage by stage. */
  stages: Record<"frame" | "axes" | "trace", { confidence: number; saw: string }>;
}

export interface Reading {
  format: FileFormat;
  quantity: Quantity;
  frequencyUnit: FrequencyUnit;
  /** Plain sentences, one for each thing that the file did not say. */
  assumed: string[];
  /** 0 to 1. */
  confidence: number;
  questions: Question[];
  /** The resolved choices: giving them back reads the same bytes to the same sweep. */
  spec: Given;
  /** Same for files of the same shape (format, columns, headings), so that a choice can be offered again. */
  shape: string;
  /** Preview for the reading page: headings and the first rows as they stand in the file. */
  preview: { headings: string[]; rows: string[][]; firstLine: number } | null;
  /** Of pictures only. */
  picture?: PictureNotes;
}

/** A located error: what was expected, where. Lines and columns count from 1. */
export interface ReadProblem {
  /** "empty" | "not-a-sweep" | "too-large" | "too-many-points" | "bad-number" | "zero-db-needed" | … */
  code: string;
  message: string;
  line?: number;
  column?: number;
}

export type ReadResult =
  | { ok: true; reading: Reading; sweep: Sweep; warnings: Warning[] }
  | { ok: false; problem: ReadProblem; reading?: Reading };

export const MAX_FILE_BYTES = 64 * 1024 * 1024;
export const MAX_POINTS = 1_000_000;
