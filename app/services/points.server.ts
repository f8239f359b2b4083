import { deflateSync, inflateSync } from "node:zlib";
import { decimate } from "../measurement/decimate.ts";
import type { Sweep } from "../measurement/sweep.ts";

/**
 * The points of a sweep as stored bytes, in parts of bounded size so that no row outgrows a packet.
 * A part: 16 bytes of header (format, flags, 2 spare, count as uint32, reference ohms as float64), then the
 * deflated columns, Float64 little endian with the bytes of equal weight side by side, which packs far better.
 * Columns: frequency, magnitude, then real and imaginary part (flag 1), then the three picture limits (flag 2).
 */

export function encodePoints(sweep: Sweep): Buffer[] {
  const columns = columnsOf(sweep);
  const flags = (sweep.gammaRe ? COMPLEX : 0) | (sweep.pictureLimits ? PICTURE : 0);
  const n = sweep.frequencyHz.length;
  const parts: Buffer[] = [];
  for (let start = 0; start < n || parts.length === 0; start += POINTS_PER_PART) {
    const count = Math.min(POINTS_PER_PART, n - start);
    const header = Buffer.alloc(HEADER_BYTES);
    header.writeUInt8(FORMAT, 0);
    header.writeUInt8(flags, 1);
    header.writeUInt32LE(count, 4);
    header.writeDoubleLE(sweep.referenceOhm, 8);
    const packed = Buffer.concat(columns.map((column) => shuffle(column.subarray(start, start + count))));
    parts.push(Buffer.concat([header, deflateSync(packed, { level: 6 })]));
  }
  return parts;
}

/** Gives back exactly what was stored, bit for bit. Throws when the bytes are not ours. */
export function decodePoints(parts: readonly Buffer[]): Sweep {
  if (parts.length === 0) throw new Error("No points are stored for this reading.");
  const heads = parts.map((part) => {
    if (part.readUInt8(0) !== FORMAT) throw new Error("Stored points have an unknown format.");
    return { flags: part.readUInt8(1), count: part.readUInt32LE(4), referenceOhm: part.readDoubleLE(8) };
  });
  const { flags, referenceOhm } = heads[0];
  const total = heads.reduce((sum, head) => sum + head.count, 0);
  const columnCount = 2 + (flags & COMPLEX ? 2 : 0) + (flags & PICTURE ? 3 : 0);
  const columns = Array.from({ length: columnCount }, () => new Float64Array(total));
  let start = 0;
  for (const [i, part] of parts.entries()) {
    const packed = inflateSync(part.subarray(HEADER_BYTES));
    const { count } = heads[i];
    for (const [c, column] of columns.entries()) {
      unshuffle(packed.subarray(c * count * 8, (c + 1) * count * 8), column.subarray(start, start + count));
    }
    start += count;
  }
  return sweepOf(columns, flags, referenceOhm);
}

/** The sweep at the chosen indices only. */
export function pickPoints(sweep: Sweep, indices: ArrayLike<number>): Sweep {
  const pick = (column: Float64Array) =>
    Float64Array.from({ length: indices.length }, (_, i) => column[indices[i]]);
  const columns = columnsOf(sweep).map(pick);
  const flags = (sweep.gammaRe ? COMPLEX : 0) | (sweep.pictureLimits ? PICTURE : 0);
  return { ...sweepOf(columns, flags, sweep.referenceOhm), plane: sweep.plane };
}

/** What lists and the first paint draw: of the sweep that the dips were found in. */
export function previewOf(sweep: Sweep): Buffer {
  return encodePoints(pickPoints(sweep, decimate(sweep, PREVIEW_POINTS)))[0];
}

function columnsOf(sweep: Sweep): Float64Array[] {
  const columns = [sweep.frequencyHz, sweep.magnitude];
  if (sweep.gammaRe && sweep.gammaIm) columns.push(sweep.gammaRe, sweep.gammaIm);
  if (sweep.pictureLimits) {
    const { frequencyHz, magnitudeLow, magnitudeHigh } = sweep.pictureLimits;
    columns.push(frequencyHz, magnitudeLow, magnitudeHigh);
  }
  return columns;
}

function sweepOf(columns: Float64Array[], flags: number, referenceOhm: number): Sweep {
  const sweep: Sweep = {
    frequencyHz: columns[0],
    magnitude: columns[1],
    referenceOhm,
    plane: "instrument",
  };
  let next = 2;
  if (flags & COMPLEX) {
    sweep.gammaRe = columns[next++];
    sweep.gammaIm = columns[next++];
  }
  if (flags & PICTURE) {
    sweep.pictureLimits = {
      frequencyHz: columns[next],
      magnitudeLow: columns[next + 1],
      magnitudeHigh: columns[next + 2],
    };
  }
  return sweep;
}

function shuffle(values: Float64Array): Buffer {
  const n = values.length;
  const bytes = new Uint8Array(values.buffer, values.byteOffset, n * 8);
  const out = Buffer.allocUnsafe(n * 8);
  for (let b = 0; b < 8; b++) for (let i = 0; i < n; i++) out[b * n + i] = bytes[i * 8 + b];
  return out;
}

function unshuffle(from: Uint8Array, into: Float64Array): void {
  const n = into.length;
  const bytes = new Uint8Array(into.buffer, into.byteOffset, n * 8);
  for (let b = 0; b < 8; b++) for (let i = 0; i < n; i++) bytes[i * 8 + b] = from[b * n + i];
}

const FORMAT = 1;
const HEADER_BYTES = 16;
const COMPLEX = 1;
const PICTURE = 2;
/** Enough for a chart 1600 px wide. */
const PREVIEW_POINTS = 1600;
/** 7 columns of 8 bytes stay under 8 MB before packing: half the usual largest packet. */
const POINTS_PER_PART = 131_072;
