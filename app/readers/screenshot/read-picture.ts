import type { FrequencyUnit, Warning } from "../../measurement/sweep.ts";
import type { Question, Reading, ReadProblem, ReadResult, ScreenshotSpec } from "../reading.ts";
import { type Axes, type FoundAxes, findAxes } from "./axes.ts";
import { type FoundFrame, type Frame, findFrame } from "./frame.ts";
import { rgbOf } from "./oklab.ts";
import type { Ocr, Picture, Stage } from "./picture.ts";
import { type KnownAxes, type ReadPoints, toPoints, toSweep } from "./to-sweep.ts";
import { type FoundTraces, findTraces } from "./traces.ts";

/** What was seen in a picture, also where no sweep came of it. */
export interface PictureDetails {
  width: number;
  height: number;
  frame: Frame | null;
  axes: Axes | null;
  /** Likeliest first; `share` of the columns in which the colour was followed. */
  traces: { color: string; share: number; chosen: boolean }[];
  /** Columns in which the trace was seen, in the axis' own unit; null without a sweep. */
  points: ReadPoints | null;
  /** The chosen trace in the picture: its place in each pixel column, NaN where it was not seen. */
  line: { x: Float64Array; y: Float64Array } | null;
  stages: { frame: Stage; axes: Stage; trace: Stage };
}

export type PictureResult = ReadResult & { picture: PictureDetails };

export type PictureProgress = (stage: "frame" | "axes" | "trace") => void;

/** Smallest side of a picture in which a plot can be read. */
const SMALLEST_SIDE = 80;
const NOT_REACHED: Stage = { confidence: 0, saw: "Not looked at." };
/** Second trace whose score, against the first, is near enough to ask which one is meant. */
const RIVAL = 0.8;

/**
 * Reads a picture of a plot: frame, axes, trace, sweep.
 *
 * `pixels` are RGBA, upright. `ocr` recognises text (not called where all axes are given). What `given` fixes
 * is not looked for. The resolved choices are in `reading.spec`: given back, the same pixels give the same
 * sweep. One point per pixel column, ascending in frequency, NaN where the trace was not seen; half-widths in
 * `pictureLimits`. Problems: "no-frame", "no-trace", "axes-needed", "zero-db-needed"; never throws for them.
 */
export async function readPicture(
  pixels: Picture,
  ocr: Ocr,
  given: ScreenshotSpec = {},
  progress: PictureProgress = () => {},
): Promise<PictureResult> {
  const details: PictureDetails = {
    width: pixels.width,
    height: pixels.height,
    frame: null,
    axes: null,
    traces: [],
    points: null,
    line: null,
    stages: { frame: NOT_REACHED, axes: NOT_REACHED, trace: NOT_REACHED },
  };
  progress("frame");
  const large = Math.min(pixels.width, pixels.height) >= SMALLEST_SIDE;
  const found = large ? findFrame(pixels, given.frame) : null;
  if (!found)
    return failed(
      details,
      "no-frame",
      "No plot was found in this picture: no rectangle of lines is large enough. Mark the plot's corners.",
    );
  details.frame = found.frame;
  details.stages.frame = { confidence: found.confidence, saw: found.saw };

  progress("axes");
  const axes = await findAxes(pixels, found, ocr, given);
  details.axes = axes.axes;
  details.stages.axes = { confidence: axes.confidence, saw: axes.saw };

  progress("trace");
  const traces = findTraces(pixels, found, given.traceColor ? rgbOf(given.traceColor) : null);
  details.traces = traces.traces.map((t, i) => ({ color: t.hex, share: t.trace.share, chosen: i === 0 }));
  details.stages.trace = { confidence: traces.confidence, saw: traces.saw };
  return conclude(details, found, axes, traces, given);
}

function conclude(
  details: PictureDetails,
  found: FoundFrame,
  axes: FoundAxes,
  traces: FoundTraces,
  given: ScreenshotSpec,
): PictureResult {
  const reading = readingOf(found, axes, traces, given, details);
  const chosen = traces.traces[0];
  if (!chosen || chosen.trace.share === 0)
    return failed(
      details,
      "no-trace",
      "No trace was found inside the frame. Choose its colour in the picture.",
      reading,
    );
  details.line = {
    x: chosen.trace.row.map((_, i) => chosen.trace.left + i),
    y: chosen.trace.row,
  };
  const { startHz, stopHz, top, bottom, quantity } = axes.axes;
  if (startHz === null || stopHz === null || top === null || bottom === null) {
    const missing = [
      startHz === null || stopHz === null ? "start and stop frequency" : "",
      top === null || bottom === null ? "the values at the top and the bottom line" : "",
    ].filter(Boolean);
    return failed(
      details,
      "axes-needed",
      `The axes could not be read. Give ${missing.join(" and ")}.`,
      reading,
    );
  }
  if (!(stopHz > startHz) || top === bottom || (axes.axes.scale === "log" && startHz <= 0)) {
    return failed(
      details,
      "axes-wrong",
      "These axes make no scale: the stop must be above the start, and the top and bottom values must differ.",
      reading,
    );
  }
  const known: KnownAxes = { ...axes.axes, startHz, stopHz, top, bottom };
  details.points = seenOnly(toPoints(chosen.trace, found.frame, known));
  if (quantity === "level" && given.zeroDb === undefined) {
    return failed(
      details,
      "zero-db-needed",
      "The axis shows raw levels. Give the level of full reflection (the 0 dB line).",
      reading,
    );
  }
  const zeroDb = quantity === "level" ? (given.zeroDb ?? 0) : 0;
  const sweep = toSweep(chosen.trace, found.frame, known, zeroDb, given.referenceOhm ?? 50);
  return { ok: true, reading, sweep, warnings: warningsOf(chosen.trace.explained), picture: details };
}

function readingOf(
  found: FoundFrame,
  axes: FoundAxes,
  traces: FoundTraces,
  given: ScreenshotSpec,
  details: PictureDetails,
): Reading {
  const { left, top, right, bottom } = found.frame;
  const { startHz, stopHz, scale, quantity } = axes.axes;
  const spec: ScreenshotSpec = {
    frame: { left, top, right, bottom },
    scale,
    quantity,
    referenceOhm: given.referenceOhm ?? 50,
  };
  if (startHz !== null) spec.startHz = startHz;
  if (stopHz !== null) spec.stopHz = stopHz;
  if (axes.axes.top !== null) spec.top = axes.axes.top;
  if (axes.axes.bottom !== null) spec.bottom = axes.axes.bottom;
  if (given.zeroDb !== undefined) spec.zeroDb = given.zeroDb;
  const color = traces.traces[0]?.hex;
  if (color) spec.traceColor = color;
  const assumed = [...axes.assumed];
  if (given.referenceOhm === undefined) assumed.push("The reference impedance was taken as 50 Ω.");
  const confidence = Math.min(found.confidence, axes.confidence, traces.confidence);
  return {
    format: "screenshot",
    quantity,
    frequencyUnit: unitFor(stopHz),
    assumed,
    confidence: Math.round(confidence * 1000) / 1000,
    questions: questionsOf(axes, traces, given),
    spec: { screenshot: spec },
    shape: `screenshot ${details.width}x${details.height} ${quantity} ${scale}`,
    preview: null,
  };
}

function questionsOf(axes: FoundAxes, traces: FoundTraces, given: ScreenshotSpec): Question[] {
  const questions: Question[] = [];
  if (axes.axes.sources.quantity === "assumed") {
    const choices = [
      { value: "s11-db", label: "S11 in dB" },
      { value: "return-loss", label: "Return loss in dB" },
      { value: "swr", label: "SWR" },
      { value: "level", label: "Raw level in dB" },
    ];
    questions.push({
      id: "quantity",
      text: "What does the vertical axis show?",
      choices,
      proposed: axes.axes.quantity,
    });
  }
  if (axes.axes.quantity === "level" && given.zeroDb === undefined) {
    questions.push({ id: "zero-db", text: "Which level is full reflection?", choices: [], proposed: null });
  }
  const [first, second] = traces.traces;
  if (first && second && given.traceColor === undefined && second.score > RIVAL * first.score) {
    const choices = traces.traces.map((t) => ({ value: t.hex, label: `The trace coloured ${t.hex}` }));
    questions.push({ id: "trace", text: "Which trace is the sweep?", choices, proposed: first.hex });
  }
  return questions;
}

function warningsOf(explained: number): Warning[] {
  const warnings: Warning[] = [
    {
      code: "read-from-picture",
      message: "Read from a picture: half a pixel and the trace's width limit every number.",
    },
  ];
  if (explained < 0.9) {
    warnings.push({
      code: "trace-broken",
      message: `The trace was seen in ${Math.round(explained * 100)} % of the columns only; the rest are gaps.`,
    });
  }
  return warnings;
}

function failed(picture: PictureDetails, code: string, message: string, reading?: Reading): PictureResult {
  const problem: ReadProblem = { code, message };
  return { ok: false, problem, ...(reading ? { reading } : {}), picture };
}

function seenOnly(points: ReadPoints): ReadPoints {
  const seen = (_: number, i: number) => !Number.isNaN(points.value[i]);
  return { frequencyHz: points.frequencyHz.filter(seen), value: points.value.filter(seen) };
}

function unitFor(stopHz: number | null): FrequencyUnit {
  if (stopHz === null) return "MHz";
  return stopHz >= 3e9 ? "GHz" : stopHz >= 1e6 ? "MHz" : stopHz >= 1e3 ? "kHz" : "Hz";
}
