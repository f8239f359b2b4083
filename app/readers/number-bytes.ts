/** Where `scanNumber` stopped; one object for all calls, so that nothing is allocated per number. */
export const scan = { at: 0, value: Number.NaN, ok: false };

const POWERS = Float64Array.from({ length: 23 }, (_, i) => 10 ** i);
/** Largest whole number up to which every one is exact in a double. */
const EXACT_LIMIT = 2 ** 53;
const ZERO = 48;

/**
 * Reads one plain decimal number from bytes [from, to) and leaves the result in `scan`: sign, digits, `decimal`
 * (as a byte), digits, E or D exponent. `scan.ok` is false where no plain number starts at `from`.
 * The double is the nearest one: exact mantissa and power within 2^53 and 10^22 (W. D. Clinger, "How to read
 * floating point numbers accurately", PLDI 1990), else the language's own conversion.
 */
export function scanNumber(bytes: Uint8Array, from: number, to: number, decimal: number): void {
  let i = from;
  let c = bytes[i];
  const negative = c === 45;
  if (negative || c === 43) c = bytes[++i];
  let mantissa = 0;
  let digits = 0;
  let fraction = 0;
  while (i < to && c >= ZERO && c <= 57) {
    mantissa = mantissa * 10 + (c - ZERO);
    digits++;
    c = bytes[++i];
  }
  if (i < to && c === decimal) {
    c = bytes[++i];
    while (i < to && c >= ZERO && c <= 57) {
      mantissa = mantissa * 10 + (c - ZERO);
      fraction++;
      c = bytes[++i];
    }
  }
  scan.ok = digits + fraction > 0;
  if (!scan.ok) return;
  let exponent = 0;
  if (i < to && (c === 69 || c === 101 || c === 68 || c === 100)) {
    let j = i + 1;
    const minus = bytes[j] === 45;
    if (minus || bytes[j] === 43) j++;
    const first = j;
    while (j < to && bytes[j] >= ZERO && bytes[j] <= 57 && j - first < 6)
      exponent = exponent * 10 + bytes[j++] - ZERO;
    if (j === first) exponent = 0;
    else i = j;
    if (minus) exponent = -exponent;
  }
  scan.at = i;
  const power = exponent - fraction;
  if (mantissa < EXACT_LIMIT && power >= -22 && power <= 22) {
    const size = power < 0 ? mantissa / POWERS[-power] : mantissa * POWERS[power];
    scan.value = negative ? -size : size;
  } else scan.value = slowly(bytes, from, i, decimal);
}

function slowly(bytes: Uint8Array, from: number, to: number, decimal: number): number {
  let text = "";
  for (let i = from; i < to; i++) {
    const c = bytes[i];
    text += c === decimal ? "." : c === 68 || c === 100 ? "e" : String.fromCharCode(c);
  }
  return Number(text);
}
