import { plainText } from "./decode.ts";

export type Kind = "picture" | "touchstone" | "text" | "foreign" | "empty";

export interface Detected {
  kind: Kind;
  /** What the bytes are, for a person: "a PNG picture", "a PDF document". */
  what: string;
  /** For "foreign": what to do instead. */
  advice: string;
}

const EXPORT_TEXT =
  "Export the trace from the program that made it as delimited text (CSV) or Touchstone, and give that file.";
/** First bytes, offset, what it is, advice; pictures have none. From the formats' public specifications. */
const MAGIC: [string, number, string, string][] = [
  ["\x89PNG\r\n\x1a\n", 0, "a PNG picture", ""],
  ["\xff\xd8\xff", 0, "a JPEG picture", ""],
  ["WEBP", 8, "a WebP picture", ""],
  ["GIF8", 0, "a GIF picture", "Save it as PNG and give that file."],
  ["BM", 0, "a BMP picture", "Save it as PNG and give that file."],
  ["II*\0", 0, "a TIFF picture", "Save it as PNG and give that file."],
  ["MM\0*", 0, "a TIFF picture", "Save it as PNG and give that file."],
  ["ftyphei", 4, "an HEIC picture", "Save it as JPEG or PNG and give that file."],
  ["ftypavif", 4, "an AVIF picture", "Save it as PNG and give that file."],
  ["%PDF-", 0, "a PDF document", `A PDF holds drawn pages, not numbers. ${EXPORT_TEXT}`],
  [
    "PK\x03\x04",
    0,
    "a ZIP archive or a spreadsheet",
    "Unpack an archive and give the files in it; save a spreadsheet as CSV.",
  ],
  [
    "\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1",
    0,
    "an old spreadsheet or document",
    "Save the table as CSV and give that file.",
  ],
  ["\x1f\x8b", 0, "a gzip archive", "Unpack it and give the file inside."],
  ["BZh", 0, "a bzip2 archive", "Unpack it and give the file inside."],
  ["\xfd7zXZ", 0, "an xz archive", "Unpack it and give the file inside."],
  ["7z\xbc\xaf\x27\x1c", 0, "a 7z archive", "Unpack it and give the files in it."],
  ["Rar!", 0, "a RAR archive", "Unpack it and give the files in it."],
  ["\x7fELF", 0, "a program", EXPORT_TEXT],
  ["MZ", 0, "a program", EXPORT_TEXT],
  ["SQLite format 3", 0, "a database file", EXPORT_TEXT],
  ["\x89HDF", 0, "an HDF5 file", EXPORT_TEXT],
  ["RIFF", 0, "a sound or video file", EXPORT_TEXT],
  ["ID3", 0, "a sound file", EXPORT_TEXT],
  ["ftyp", 4, "a video file", EXPORT_TEXT],
  ["{\\rtf", 0, "a rich-text document", "Save it as plain text and give that file."],
];
const MARKUP = /^\s*(?:<\?xml[^>]*>\s*)?(?:<!--[\s\S]{0,2000}?-->\s*)*<(svg|!doctype|html|\w+)[\s>]/i;
const HEAD_BYTES = 16_384;
/** Share of control characters above which a file is no text; seen 0 in text, over 0.1 in other files. */
const CONTROL_SHARE = 0.02;

const OPTION_TOKENS = /^(?:[kmg]?hz|[syzgh]|db|ma|ri|r|[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)$/i;

/** Says what a file is, from its bytes first and its name second. Never fails. */
export function detect(name: string, bytes: Uint8Array): Detected {
  if (bytes.length === 0) return { kind: "empty", what: "an empty file", advice: "Export the sweep again." };
  for (const [mark, offset, what, advice] of MAGIC)
    if (hasMark(bytes, mark, offset)) return { kind: advice === "" ? "picture" : "foreign", what, advice };
  const plain = plainText(bytes.subarray(0, HEAD_BYTES));
  const head = plain.text(0, plain.bytes.length);
  if (head.trim() === "" && bytes.length <= HEAD_BYTES)
    return { kind: "empty", what: "a file without any text", advice: "Export the sweep again." };
  const markup = head.match(MARKUP);
  if (markup) {
    const what = markup[1].toLowerCase() === "svg" ? "an SVG drawing" : "a markup document";
    return { kind: "foreign", what, advice: EXPORT_TEXT };
  }
  if (isBinary(plain.bytes)) return { kind: "foreign", what: "not a text file", advice: EXPORT_TEXT };
  return { kind: isTouchstone(name, head) ? "touchstone" : "text", what: "text", advice: "" };
}

/** Port count that a Touchstone name tells (".s2p"), null where it tells none. */
export function portsFromName(name: string): number | null {
  const match = name.match(/\.s(\d{1,2})p$/i);
  return match && Number(match[1]) > 0 ? Number(match[1]) : null;
}

function hasMark(bytes: Uint8Array, mark: string, offset: number): boolean {
  if (bytes.length < offset + mark.length) return false;
  for (let i = 0; i < mark.length; i++) if (bytes[offset + i] !== mark.charCodeAt(i)) return false;
  return true;
}

function isBinary(bytes: Uint8Array): boolean {
  let control = 0;
  for (const c of bytes) if (c < 32 && (c < 9 || c > 13) && c !== 0x1a) control++;
  return control > bytes.length * CONTROL_SHARE;
}

/** A name like .s1p or .ts with an option line or keyword, or a first line of content that only Touchstone has. */
function isTouchstone(name: string, head: string): boolean {
  if (portsFromName(name) !== null) return true;
  const lines = head.split(/\r\n|\r|\n/).map((line) => line.replace(/!.*/, "").trim());
  const content = lines.filter((line) => line !== "" && !/^begin$/i.test(line));
  if (content.length === 0) return false;
  if (/^\[version\]/i.test(content[0])) return true;
  const tokens = content[0]
    .replace(/^#\d{2,10}(?=#)/, "")
    .match(/^#\s*(.*)$/)?.[1]
    .split(/\s+/)
    .filter((t) => t !== "");
  if (!tokens?.every((token) => OPTION_TOKENS.test(token))) return false;
  if (/\.ts$/i.test(name)) return true;
  const numbers = (content[1] ?? "").split(/\s+/).length;
  return numbers % 2 === 1 && numbers >= 3 && tokens.some((t) => /^[syzghr]$/i.test(t));
}
