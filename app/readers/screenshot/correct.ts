import type {
  Given,
  MaskedStretch,
  PictureNotes,
  PicturePoint,
  Reading,
  ScreenshotSpec,
} from "../reading.ts";
import { evenLight } from "./even-light.ts";
import { paintAway } from "./paint.ts";
import type { Ocr, Picture } from "./picture.ts";
import { type PictureProgress, type PictureResult, readPicture } from "./read-picture.ts";
import { cornersOf, type FlatPlot, mapPoint, rectify } from "./rectify.ts";

export type CorrectedResult = PictureResult & {
  /** The plot's corners in the upright picture; null where no plot was found. */
  corners: PicturePoint[] | null;
};

/**
 * Reads a picture like `readPicture`, with the corrections that a person may make besides: four corners of a plot
 * seen at an angle, misread stretches, a second trace as the 0 dB line.
 *
 * The resolved choices, these among them, are in `reading.spec`: given back, the same pixels give the same sweep
 * and `ocr` is not called. `picture.line` is in pixels of the picture as it was handed in. Problems besides those
 * of `readPicture`: "corners-wrong", "no-zero-trace"; a reading comes with every problem.
 */
export async function readCorrected(
  pixels: Picture,
  ocr: Ocr,
  given: ScreenshotSpec = {},
  progress?: PictureProgress,
): Promise<CorrectedResult> {
  const { corners, masked = [], zeroTrace, ...direct } = given;
  const flat = corners ? rectify(pixels, corners) : null;
  if (flat) direct.frame = flat.plot.frame;
  if (zeroTrace) direct.zeroDb = 0;
  const plain = flat ? evenLight(flat.picture, flat.plot.frame) : pixels;
  const seen = paintAway(plain, masked);
  const result = await readPicture(seen, ocr, direct, progress);
  const found = corners && !flat ? cornersProblem(result) : result;
  const levelled = zeroTrace ? await againstTrace(found, seen, ocr, zeroTrace) : found;
  leaveGaps(levelled, masked);
  return withChoices(levelled, pixels, given, flat?.plot ?? null);
}

function cornersProblem(result: PictureResult): PictureResult {
  return {
    ok: false,
    problem: {
      code: "corners-wrong",
      message:
        "These four corners enclose no plot. Give them in order around it, the top left first, none inside the others.",
    },
    ...(result.reading ? { reading: result.reading } : {}),
    picture: { ...result.picture, frame: null, line: null, points: null },
  };
}

/** Refers every column to the value that another trace has there; a gap where that one was not seen. */
async function againstTrace(
  result: PictureResult,
  pixels: Picture,
  ocr: Ocr,
  zeroTrace: string,
): Promise<PictureResult> {
  if (!result.ok) return result;
  const spec = { ...result.reading.spec.screenshot, traceColor: zeroTrace, zeroDb: 0 };
  const reference = await readPicture(pixels, ocr, spec);
  if (!reference.ok) {
    const message = `The trace ${zeroTrace} was not found, so there is no 0 dB line. Choose its colour in the picture or give a number.`;
    const problem = { code: "no-zero-trace", message };
    return { ok: false, problem, reading: result.reading, picture: result.picture };
  }
  const { magnitude, pictureLimits } = result.sweep;
  const zero = reference.sweep;
  for (let i = 0; i < magnitude.length; i++) {
    magnitude[i] /= zero.magnitude[i];
    if (!pictureLimits || !zero.pictureLimits) continue;
    pictureLimits.magnitudeLow[i] /= zero.pictureLimits.magnitudeHigh[i];
    pictureLimits.magnitudeHigh[i] /= zero.pictureLimits.magnitudeLow[i];
  }
  return result;
}

function leaveGaps(result: PictureResult, masked: readonly MaskedStretch[]): void {
  const { line } = result.picture;
  const whole = masked.filter((stretch) => stretch.top === undefined || stretch.bottom === undefined);
  if (!line) return;
  for (let i = 0; i < line.x.length; i++) {
    if (!whole.some(({ fromX, toX }) => line.x[i] >= fromX && line.x[i] <= toX)) continue;
    line.y[i] = Number.NaN;
    if (!result.ok) continue;
    const { magnitude, pictureLimits } = result.sweep;
    magnitude[i] = Number.NaN;
    if (!pictureLimits) continue;
    pictureLimits.magnitudeLow[i] = Number.NaN;
    pictureLimits.magnitudeHigh[i] = Number.NaN;
  }
}

function withChoices(
  result: PictureResult,
  pixels: Picture,
  given: ScreenshotSpec,
  plot: FlatPlot | null,
): CorrectedResult {
  const { picture } = result;
  const corners = plot ? (given.corners ?? null) : picture.frame && cornersOf(picture.frame);
  if (plot && picture.line) {
    const { x, y } = picture.line;
    for (let i = 0; i < x.length; i++) {
      const at = mapPoint(plot.toPicture, { x: x[i], y: y[i] });
      x[i] = at.x;
      y[i] = at.y;
    }
  }
  const reading = result.reading ?? bareReading();
  const spec: ScreenshotSpec = { ...reading.spec.screenshot };
  if (given.corners) {
    spec.corners = given.corners;
    delete spec.frame;
  }
  if (given.masked?.length) spec.masked = given.masked;
  if (given.zeroTrace) {
    spec.zeroTrace = given.zeroTrace;
    delete spec.zeroDb;
  }
  const whole: Reading = {
    ...reading,
    spec: { screenshot: spec },
    shape: shapeOf(pixels, corners),
    picture: notesOf(result),
  };
  if (given.zeroTrace) whole.questions = whole.questions.filter((question) => question.id !== "zero-db");
  return { ...result, reading: whole, corners } as CorrectedResult;
}

function notesOf({ picture }: PictureResult): PictureNotes {
  const { width, height, axes, stages } = picture;
  return { width, height, sources: axes?.sources ?? null, stages };
}

/** The choices that hold for the next picture of the same kind of screen; its axes are its own. */
export function reusableSpec(spec: ScreenshotSpec): Given {
  const { quantity, zeroDb, zeroTrace, traceColor, referenceOhm } = spec;
  const kept = Object.entries({ quantity, zeroDb, zeroTrace, traceColor, referenceOhm });
  return { screenshot: Object.fromEntries(kept.filter(([, value]) => value !== undefined)) };
}

/** Where nothing was recognised at all: the page still offers every choice. */
function bareReading(): Reading {
  return {
    format: "screenshot",
    quantity: "s11-db",
    frequencyUnit: "MHz",
    assumed: [],
    confidence: 0,
    questions: [],
    spec: { screenshot: {} },
    shape: "",
    preview: null,
  };
}

/** The same for pictures of one screen: their size, and where in it the plot lies, in twentieths. */
function shapeOf({ width, height }: Picture, corners: PicturePoint[] | null): string {
  const place = corners
    ? [corners[0].x / width, corners[0].y / height, corners[2].x / width, corners[2].y / height]
    : [];
  return `screenshot ${width}x${height} ${place.map((share) => Math.round(share * 20)).join(" ")}`.trim();
}
