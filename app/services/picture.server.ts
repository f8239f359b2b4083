import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import sharp, { type Metadata } from "sharp";
import { createWorker, PSM, type Worker } from "tesseract.js";
import type { SweepFile } from "../readers/read.ts";
import type { Given } from "../readers/reading.ts";
import { type CorrectedResult, readCorrected } from "../readers/screenshot/correct.ts";
import type { Ocr, Picture, TextKind, Word } from "../readers/screenshot/picture.ts";
import type { PictureProgress } from "../readers/screenshot/read-picture.ts";

/** Decoding and text recognition for `readers/screenshot` on the server and on the command line. */

export const MAX_PICTURE_PIXELS = 40_000_000;

/** A picture that is not decoded, with a sentence for the person who gave it. */
export class PictureRefused extends Error {
  readonly code: string;
  constructor(code: string, message: string) {
    super(message);
    this.code = code;
  }
}

const FORMATS = new Set(["png", "jpeg", "webp"]);

/**
 * Decodes PNG, JPEG or WebP to raw pixels, turned upright as its EXIF orientation says.
 *
 * Transparent pixels are laid on white. Throws `PictureRefused` for anything else: other formats, several
 * frames, more than 40 megapixels, damaged data. The size is checked before any pixel is decoded.
 */
export async function decodePicture(bytes: Uint8Array): Promise<Picture> {
  const options = { limitInputPixels: MAX_PICTURE_PIXELS, failOn: "error" as const };
  const header = await headerOf(bytes);
  if (!FORMATS.has(header.format ?? "")) {
    throw new PictureRefused(
      "picture-format",
      "Pictures are read from PNG, JPEG and WebP only. Save it as one of them.",
    );
  }
  if ((header.pages ?? 1) > 1) {
    throw new PictureRefused(
      "animated",
      "This picture is animated. Give a still picture of the moment to be read.",
    );
  }
  if (header.width * header.height > MAX_PICTURE_PIXELS) {
    throw new PictureRefused("too-large", "This picture has more than 40 megapixels. Give a smaller copy.");
  }
  try {
    if (isCutShort(bytes, header.format)) throw new Error("The picture's end is missing.");
    const { data, info } = await sharp(bytes, options)
      .autoOrient()
      .flatten({ background: "#ffffff" })
      .toColourspace("srgb")
      .ensureAlpha()
      .raw({ depth: "uchar" })
      .toBuffer({ resolveWithObject: true });
    return { width: info.width, height: info.height, data };
  } catch {
    throw new PictureRefused("damaged", "This picture is damaged or cut short. Save or send it again.");
  }
}

async function headerOf(bytes: Uint8Array): Promise<Metadata> {
  try {
    return await sharp(bytes, { animated: true, limitInputPixels: false }).metadata();
  } catch {
    throw new PictureRefused(
      "not-a-picture",
      "This is not a picture that can be read. Give a PNG, JPEG or WebP.",
    );
  }
}

/** The decoders fill up a cut picture in silence: PNG ends with IEND, JPEG with a marker behind its last scan. */
function isCutShort(bytes: Uint8Array, format: string | undefined): boolean {
  const all = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (format === "png") return all.lastIndexOf("IEND") < 0;
  if (format === "jpeg")
    return all.lastIndexOf(Buffer.from([0xff, 0xd9])) < all.lastIndexOf(Buffer.from([0xff, 0xda]));
  return false;
}

/**
 * Reads a picture file to a sweep. Text recognition is started when it is first needed and kept for the next
 * picture; `closePictureReader` ends it. A file that is not decoded ends in a problem, never in an exception.
 */
export async function readPictureFile(
  file: SweepFile,
  given: Given = {},
  progress?: PictureProgress,
): Promise<CorrectedResult> {
  let pixels: Picture;
  try {
    pixels = await decodePicture(file.bytes);
  } catch (error) {
    if (!(error instanceof PictureRefused)) throw error;
    const unseen = { confidence: 0, saw: "The picture was not decoded." };
    const picture = {
      width: 0,
      height: 0,
      frame: null,
      axes: null,
      traces: [],
      points: null,
      line: null,
      stages: { frame: unseen, axes: unseen, trace: unseen },
    };
    return { ok: false, problem: { code: error.code, message: error.message }, picture, corners: null };
  }
  return readCorrected(pixels, recogniseText, given.screenshot, progress);
}

/** Recognises the text of a region; the first call starts the recognition. */
export const recogniseText: Ocr = async (region, kind) => {
  recognition ??= openTextRecognition();
  return (await recognition).ocr(region, kind);
};

/** Ends text recognition; the next picture starts it again. */
export async function closePictureReader(): Promise<void> {
  const open = recognition;
  recognition = null;
  await (await open)?.close();
}

let recognition: Promise<TextRecognition> | null = null;

const MODES: Record<TextKind, PSM> = {
  scattered: PSM.SPARSE_TEXT,
  line: PSM.SINGLE_LINE,
  number: PSM.SINGLE_WORD,
};

export interface TextRecognition {
  ocr: Ocr;
  close: () => Promise<void>;
}

/** Starts text recognition; offline, with the language data of the package. One region at a time. */
export async function openTextRecognition(): Promise<TextRecognition> {
  const require = createRequire(import.meta.url);
  const langPath = join(dirname(require.resolve("@tesseract.js-data/eng/package.json")), "4.0.0_best_int");
  const worker = await createWorker("eng", 1, { langPath, gzip: true, cacheMethod: "none" });
  let last: Promise<unknown> = Promise.resolve();
  const ocr: Ocr = (region, kind) => {
    const next = last.then(() => recognise(worker, region, kind));
    last = next.catch(() => undefined);
    return next;
  };
  return { ocr, close: async () => void (await worker.terminate()) };
}

async function recognise(
  worker: Worker,
  region: { width: number; height: number; data: Uint8Array },
  kind: TextKind,
): Promise<Word[]> {
  const { width, height, data } = region;
  const png = await sharp(data, { raw: { width, height, channels: 1 } })
    .png({ compressionLevel: 1 })
    .toBuffer();
  await worker.setParameters({
    tessedit_pageseg_mode: MODES[kind],
    tessedit_char_whitelist: kind === "number" ? "0123456789.-" : "",
    user_defined_dpi: "150",
  });
  const result = await worker.recognize(png, {}, { blocks: true, text: false });
  const words: Word[] = [];
  for (const block of result.data.blocks ?? []) {
    for (const paragraph of block.paragraphs) {
      for (const line of paragraph.lines) {
        for (const { text, confidence, bbox } of line.words) {
          words.push({
            text,
            confidence: confidence / 100,
            left: bbox.x0,
            top: bbox.y0,
            right: bbox.x1,
            bottom: bbox.y1,
          });
        }
      }
    }
  }
  return words;
}
