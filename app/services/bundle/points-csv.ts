import { gammaToReturnLossDb, gammaToSwr } from "../../measurement/reflection.ts";
import type { Sweep } from "../../measurement/sweep.ts";
import { MAX_POINTS } from "../../readers/reading.ts";

/**
 * The points of a reading in a bundle: CSV with a header line (RFC 4180), every digit of the stored numbers, an empty cell
 * for a gap. `return_loss_db` and `swr` are for readers; they follow from `gamma_magnitude` and are not read back.
 */
export function* pointsToCsv(sweep: Sweep): Generator<string> {
  const columns = columnsOf(sweep);
  yield `${["frequency_hz", "return_loss_db", "swr", ...columns.slice(1).map(([name]) => name)].join(",")}\r\n`;
  let text = "";
  for (let i = 0; i < sweep.frequencyHz.length; i++) {
    const gamma = sweep.magnitude[i];
    const cells = [sweep.frequencyHz[i], gammaToReturnLossDb(gamma), gammaToSwr(gamma)].map(shown);
    for (const [, column] of columns.slice(1)) cells.push(exact(column[i]));
    text += `${cells.join(",")}\r\n`;
    if (text.length > CHUNK) {
      yield text;
      text = "";
    }
  }
  yield text;
}

/** Reads them back, bit for bit. Throws a sentence that names the line. */
export async function pointsFromCsv(lines: AsyncIterable<string>, referenceOhm: number): Promise<Sweep> {
  let names: string[] | null = null;
  const columns = new Map<string, number[]>();
  let line = 0;
  for await (const text of lines) {
    line++;
    if (!names) {
      names = text.split(",");
      for (const name of names) {
        if (!READ.has(name)) continue;
        if (columns.has(name)) throw new Error(`there are two columns ${name}`);
        columns.set(name, []);
      }
      continue;
    }
    if (text === "") continue;
    if (line > MAX_POINTS + 1) throw new Error(`there are more than ${MAX_POINTS} points`);
    const cells = text.split(",");
    if (cells.length !== names.length) throw new Error(`line ${line} has ${cells.length} cells`);
    for (const [i, name] of names.entries()) columns.get(name)?.push(numberIn(cells[i], line));
  }
  const take = (name: string) => {
    const values = columns.get(name);
    return values && Float64Array.from(values);
  };
  const frequencyHz = take("frequency_hz");
  const magnitude = take("gamma_magnitude");
  if (!frequencyHz || !magnitude)
    throw new Error("the columns frequency_hz and gamma_magnitude are not there");
  if (frequencyHz.length === 0) throw new Error("there are no points");
  for (let i = 0; i < frequencyHz.length; i++) {
    if (
      !(frequencyHz[i] > (i === 0 ? -1 : frequencyHz[i - 1])) ||
      frequencyHz[i] === Number.POSITIVE_INFINITY
    ) {
      throw new Error(`line ${i + 2} does not go up in frequency`);
    }
  }
  const sweep: Sweep = { frequencyHz, magnitude, referenceOhm, plane: "instrument" };
  const [gammaRe, gammaIm] = [take("gamma_real"), take("gamma_imaginary")];
  if (gammaRe && gammaIm) Object.assign(sweep, { gammaRe, gammaIm });
  const [half, low, high] = PICTURE.map(take);
  if (half && low && high) {
    sweep.pictureLimits = { frequencyHz: half, magnitudeLow: low, magnitudeHigh: high };
  }
  return sweep;
}

function columnsOf(sweep: Sweep): [string, Float64Array][] {
  const columns: [string, Float64Array][] = [
    ["frequency_hz", sweep.frequencyHz],
    ["gamma_magnitude", sweep.magnitude],
  ];
  if (sweep.gammaRe && sweep.gammaIm) {
    columns.push(["gamma_real", sweep.gammaRe], ["gamma_imaginary", sweep.gammaIm]);
  }
  if (sweep.pictureLimits) {
    const { frequencyHz, magnitudeLow, magnitudeHigh } = sweep.pictureLimits;
    columns.push([PICTURE[0], frequencyHz], [PICTURE[1], magnitudeLow], [PICTURE[2], magnitudeHigh]);
  }
  return columns;
}

function exact(value: number): string {
  if (Number.isNaN(value)) return "";
  return Object.is(value, -0) ? "-0" : String(value);
}

function shown(value: number): string {
  return Number.isFinite(value) ? String(value) : "";
}

function numberIn(cell: string, line: number): number {
  if (cell === "") return Number.NaN;
  // As `String` writes it: a space and "0x10" would be numbers too.
  const value = /^-?(?:\d[\d.e+-]*|Infinity)$/.test(cell) ? Number(cell) : Number.NaN;
  if (Number.isNaN(value)) throw new Error(`line ${line} has a cell that is no number`);
  return value;
}

const PICTURE = ["picture_half_hz", "picture_gamma_low", "picture_gamma_high"];
const READ = new Set(["frequency_hz", "gamma_magnitude", "gamma_real", "gamma_imaginary", ...PICTURE]);
const CHUNK = 64 * 1024;
