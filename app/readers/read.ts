import { detect } from "./detect.ts";
import { fail, ReadFailure } from "./problem.ts";
import { type Given, MAX_FILE_BYTES, type Reading, type ReadResult, type TextSpec } from "./reading.ts";
import { textAnswer } from "./text/questions.ts";
import { readText } from "./text/read-text.ts";
import { readTouchstone } from "./touchstone/read-touchstone.ts";

export interface SweepFile {
  /** File name; only its ending is looked at. */
  name: string;
  bytes: Uint8Array;
}

/** Reads a picture; handed in, because decoding one is not pure computation. */
export type PictureReader = (file: SweepFile, given: Given) => Promise<ReadResult>;

/**
 * Reads a text or Touchstone file: finds its format from its bytes, then its sweep (Hz ascending, each frequency once;
 * abs Γ or Γ; NaN for gaps). `given` overrules what is found. Any bytes end in a sweep or a located problem:
 * this never throws. A picture ends in the problem "picture": see `readAny`.
 */
export function read(file: SweepFile, given: Given = {}): ReadResult {
  try {
    if (file.bytes.length > MAX_FILE_BYTES)
      fail(
        "too-large",
        `The file has ${(file.bytes.length / 2 ** 20).toFixed(1)} MB; the limit is ${MAX_FILE_BYTES / 2 ** 20} MB. Export the sweep with fewer points.`,
      );
    const { kind, what, advice } = detect(file.name, file.bytes);
    if (kind === "empty") fail("empty", `This is ${what}: expected a sweep. ${advice}`, 1, 1);
    if (kind === "foreign")
      fail("not-a-format", `This is ${what}: expected text, Touchstone or a picture. ${advice}`, 1, 1);
    if (kind === "picture")
      fail("picture", `This is ${what}: pictures are read by the screenshot reader.`, 1, 1);
    if (kind === "touchstone" && given.text?.valueColumn === undefined)
      return readTouchstone(file, given.touchstone);
    return readText(file.bytes, given.text, given.quantity);
  } catch (error) {
    if (error instanceof ReadFailure) return { ok: false, problem: error.problem };
    throw error;
  }
}

/** Like `read`, with pictures (PNG, JPEG, WebP) handed to `picture` where there is one. */
export async function readAny(
  file: SweepFile,
  given: Given = {},
  readers: { picture?: PictureReader } = {},
): Promise<ReadResult> {
  const picture = file.bytes.length <= MAX_FILE_BYTES && detect(file.name, file.bytes).kind === "picture";
  return picture && readers.picture ? readers.picture(file, given) : read(file, given);
}

/** The givens that follow from answering one of a reading's questions; read the same bytes again with them. */
export function answer(reading: Reading, questionId: string, value: string): Given {
  const { spec } = reading;
  if (spec.text) {
    const { headerLine: _header, firstDataLine: _first, angleUnit: _angle, ...elsewhere } = spec.text;
    const kept = questionId === "block" ? elsewhere : spec.text;
    const { angleUnit: _unit, ...other } = kept as TextSpec;
    return {
      ...spec,
      text: { ...(questionId === "trace" ? other : kept), ...textAnswer(questionId, value) },
    };
  }
  if (spec.touchstone && questionId === "port")
    return { ...spec, touchstone: { ...spec.touchstone, port: Number(value) } };
  return spec;
}

/**
 * The choices of a reading that hold for the next file of the same shape: all but those that point at lines
 * of this one file.
 */
export function reusable(reading: Reading): Given {
  if (!reading.spec.text) return reading.spec;
  const { headerLine: _h, firstDataLine: _f, encoding: _e, ...text } = reading.spec.text;
  return { ...reading.spec, text };
}
