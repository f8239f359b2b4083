import type { TextSpec } from "./reading.ts";

/** Share of zero bytes on one side of the byte pairs that shows UTF-16 without a mark; seen 0.45 to 0.5. */
const UTF16_ZERO_SHARE = 0.3;
const UTF16_SAMPLE_BYTES = 4096;

export interface Plain {
  /** The file as UTF-8 or as single bytes, without byte order mark. */
  bytes: Uint8Array;
  encoding: TextSpec["encoding"];
  /** Text of a stretch of `bytes`. */
  text: (from: number, to: number) => string;
}

/**
 * Finds the encoding of a text file and brings it to a form in which digits, delimiters and line ends
 * are single bytes: UTF-8 stays, UTF-16 becomes UTF-8, all else counts as windows-1252.
 * `given` overrules what was found. Never fails: undecodable parts become replacement characters.
 */
export function plainText(bytes: Uint8Array, given?: TextSpec["encoding"]): Plain {
  const encoding = given ?? encodingOf(bytes);
  if (encoding === "utf-16le" || encoding === "utf-16be") {
    const text = decodeUtf16(bytes, encoding === "utf-16be");
    return { ...plainText(new TextEncoder().encode(text), "utf-8"), encoding };
  }
  const decoder = new TextDecoder(encoding === "latin1" ? "windows-1252" : "utf-8", { ignoreBOM: true });
  const body = startsWith(bytes, [0xef, 0xbb, 0xbf]) ? bytes.subarray(3) : bytes;
  return { bytes: body, encoding, text: (from, to) => decoder.decode(body.subarray(from, to)) };
}

function encodingOf(bytes: Uint8Array): TextSpec["encoding"] {
  if (startsWith(bytes, [0xff, 0xfe])) return "utf-16le";
  if (startsWith(bytes, [0xfe, 0xff])) return "utf-16be";
  if (startsWith(bytes, [0xef, 0xbb, 0xbf])) return "utf-8";
  return utf16WithoutMark(bytes) ?? (isUtf8(bytes) ? "utf-8" : "latin1");
}

function utf16WithoutMark(bytes: Uint8Array): "utf-16le" | "utf-16be" | null {
  const n = Math.min(bytes.length, UTF16_SAMPLE_BYTES) & ~1;
  let even = 0;
  let odd = 0;
  for (let i = 0; i < n; i += 2) {
    if (bytes[i] === 0) even++;
    if (bytes[i + 1] === 0) odd++;
  }
  const least = n * UTF16_ZERO_SHARE;
  if (n < 8) return null;
  if (odd > least && even < odd / 8) return "utf-16le";
  if (even > least && odd < even / 8) return "utf-16be";
  return null;
}

function isUtf8(bytes: Uint8Array): boolean {
  let high = 0;
  for (let i = 0; i < bytes.length; i++) high |= bytes[i];
  if (high < 0x80) return true;
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes);
    return true;
  } catch {
    return false;
  }
}

function decodeUtf16(bytes: Uint8Array, bigEndian: boolean): string {
  const even = bytes.subarray(0, bytes.length & ~1);
  if (!bigEndian) return new TextDecoder("utf-16le").decode(even);
  const swapped = new Uint8Array(even.length);
  for (let i = 0; i < even.length; i += 2) {
    swapped[i] = even[i + 1];
    swapped[i + 1] = even[i];
  }
  return new TextDecoder("utf-16le").decode(swapped);
}

function startsWith(bytes: Uint8Array, mark: number[]): boolean {
  return bytes.length >= mark.length && mark.every((b, i) => bytes[i] === b);
}
