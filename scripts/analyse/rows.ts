import type { Analysis, Dip, Sweep, Warning } from "../../app/measurement/sweep.ts";
import type { Reading, ReadProblem } from "../../app/readers/reading.ts";
import type { PictureDetails } from "../../app/readers/screenshot/read-picture.ts";
import type { ReadPoints } from "../../app/readers/screenshot/to-sweep.ts";
import type { Done } from "./correction.ts";

/** One file's answer, in the field names that other programs rely on. */
export interface AnalysedFile {
  file: string;
  sha256: string;
  reading: Reading;
  sweep: Sweep;
  analysis: Analysis;
  warnings: Warning[];
  /** Where a correction was asked for. */
  done?: Done;
  /** Of pictures only. */
  picture?: PictureDetails;
}

export interface FailedFile {
  file: string;
  sha256?: string;
  error: ReadProblem;
  /** What was seen in a picture all the same. */
  picture?: PictureDetails;
}

/** The JSON object of a file; numbers that are unknown or infinite are null. */
export function jsonRow(
  { file, sha256, reading, sweep, analysis, warnings, done, picture }: AnalysedFile,
  points: boolean,
) {
  const n = sweep.frequencyHz.length;
  return {
    file,
    sha256,
    format: reading.format,
    reading: {
      quantity: reading.quantity,
      frequencyUnit: reading.frequencyUnit,
      assumed: reading.assumed,
      confidence: reading.confidence,
    },
    sweep: {
      points: n,
      startHz: sweep.frequencyHz[0],
      stopHz: sweep.frequencyHz[n - 1],
      referenceOhm: sweep.referenceOhm,
      complex: sweep.gammaRe !== undefined,
    },
    ...(done ? { correction: done.correction } : {}),
    dips: analysis.dips.map(dipRow),
    warnings,
    ...(picture ? pictureRow(picture) : {}),
    ...(points ? { points: picture?.points ? seenRow(picture.points) : pointRow(reading, sweep) } : {}),
    ...(points && done ? { corrected: correctedRow(done.sweep) } : {}),
  };
}

/** The JSON object of a file that was not read. */
export function failedRow({ picture, ...row }: FailedFile) {
  return { ...row, ...(picture?.frame ? pictureRow(picture) : {}) };
}

function pictureRow({ frame, axes, traces }: PictureDetails) {
  return { frame, axes, traces };
}

function seenRow({ frequencyHz, value }: ReadPoints) {
  return { frequencyHz: Array.from(frequencyHz), value: Array.from(value) };
}

function dipRow(dip: Dip) {
  const { bandwidth } = dip;
  return {
    frequencyHz: dip.frequencyHz,
    frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
    minimumSwr: dip.minimumSwr,
    minimumSwrLow: dip.minimumSwrLow,
    minimumSwrHigh: dip.minimumSwrHigh,
    returnLossDb: dip.returnLossDb,
    bandwidth: bandwidth && {
      limitSwr: bandwidth.limitSwr,
      lowHz: bandwidth.lowHz,
      highHz: bandwidth.highHz,
      widthHz: bandwidth.widthHz,
      open: bandwidth.open,
      shared: bandwidth.shared,
    },
    q: dip.q,
    method: dip.method,
    edge: dip.edge,
  };
}

/** Points in the quantity read; complex sweeps give abs Γ, with its real and imaginary part beside it. */
function pointRow(reading: Reading, sweep: Sweep) {
  const frequencyHz = Array.from(sweep.frequencyHz);
  const value = Array.from(sweep.magnitude, shownValue(reading));
  if (!sweep.gammaRe || !sweep.gammaIm) return { frequencyHz, value };
  return { frequencyHz, value, re: Array.from(sweep.gammaRe), im: Array.from(sweep.gammaIm) };
}

/** abs Γ after the correction, gaps where it does not hold. */
function correctedRow({ frequencyHz, magnitude, gammaRe, gammaIm }: Sweep) {
  const row = { frequencyHz: Array.from(frequencyHz), value: Array.from(magnitude) };
  return gammaRe && gammaIm ? { ...row, re: Array.from(gammaRe), im: Array.from(gammaIm) } : row;
}

function shownValue({ quantity, spec }: Reading): (magnitude: number) => number {
  const zeroDb = spec.text?.zeroDb ?? spec.screenshot?.zeroDb ?? 0;
  switch (quantity) {
    case "s11-db":
      return (m) => 20 * Math.log10(m);
    case "return-loss":
      return (m) => -20 * Math.log10(m);
    case "level":
      return (m) => 20 * Math.log10(m) + zeroDb;
    case "swr":
      return (m) => (m < 1 ? (1 + m) / (1 - m) : m >= 1 ? Infinity : Number.NaN);
    default:
      return (m) => m;
  }
}
