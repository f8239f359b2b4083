import type { Readable } from "node:stream";
import { type Entry, fromBuffer, type ZipFile } from "yauzl";
import { MAX_FILE_BYTES } from "~/readers/reading";
import { isOfSystem, safePath } from "./paths.ts";

/** The files of a ZIP, each within bounds; what is refused is said and nothing of it is kept. */

export type Unpacked =
  | { kind: "file"; path: string; bytes: Uint8Array }
  | { kind: "refused"; path: string; sizeBytes: number; words: string }
  | { kind: "passed-over" };

export interface UnpackLimits {
  mostEntries: number;
  /** Of all files together, unpacked. */
  mostBytes: number;
}

export function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && [0x03, 0x05].includes(bytes[2]);
}

/** Throws `NotAZip` with words for a person where the whole of it can't be unpacked. */
export async function* unpack(bytes: Uint8Array, limits: UnpackLimits): AsyncGenerator<Unpacked> {
  const zip = await open(bytes);
  let left = limits.mostBytes;
  let entries = 0;
  const seen = new Set<string>();
  try {
    for await (const entry of entriesOf(zip)) {
      if (++entries > MOST_IN_LIST) throw new NotAZip(`The ZIP lists more than ${MOST_IN_LIST} entries.`);
      const name = nameOf(entry);
      if (name.endsWith("/")) continue;
      const safe = safePath(name);
      const path = "path" in safe ? safe.path : name.slice(0, 200);
      if ("path" in safe && isOfSystem(safe.path)) {
        yield { kind: "passed-over" };
        continue;
      }
      const refusal = "refused" in safe ? safe.refused : refusalOf(entry, path, seen, left, limits);
      if (refusal) {
        yield { kind: "refused", path, sizeBytes: entry.uncompressedSize, words: refusal };
        continue;
      }
      seen.add(path.toLowerCase());
      const found = await contentOf(zip, entry);
      if ("words" in found) {
        yield { kind: "refused", path, sizeBytes: entry.uncompressedSize, words: found.words };
        continue;
      }
      left -= found.bytes.length;
      yield isZip(found.bytes)
        ? { kind: "refused", path, sizeBytes: found.bytes.length, words: NESTED }
        : { kind: "file", path, bytes: found.bytes };
    }
  } finally {
    zip.close();
  }
}

export class NotAZip extends Error {}

function refusalOf(
  entry: Entry,
  path: string,
  seen: ReadonlySet<string>,
  left: number,
  { mostEntries, mostBytes }: UnpackLimits,
): string | null {
  const { uncompressedSize: size, compressedSize: packed } = entry;
  if (((entry.externalFileAttributes >>> 16) & 0o170000) === 0o120000) {
    return "It is a link to another place, not a file. It was not unpacked.";
  }
  if (entry.generalPurposeBitFlag & 1)
    return "It is locked with a password. Unpack it first and send the file.";
  if (seen.has(path.toLowerCase())) return "The ZIP has two files of this name. Only the first was unpacked.";
  if (seen.size >= mostEntries)
    return `At most ${mostEntries} files go at once. Send this one in the next batch.`;
  if (size > MAX_FILE_BYTES) return `It has ${megabytes(size)} MB unpacked; the most that is taken is 64 MB.`;
  if (size > RATIO_FROM_BYTES && size > packed * MOST_RATIO) {
    return `It grows ${Math.round(size / Math.max(packed, 1))} times when unpacked; no sweep does. It was not unpacked.`;
  }
  if (size > left)
    return `All files together have more than ${megabytes(mostBytes)} MB. Send this one in the next batch.`;
  return null;
}

/** More than it says of itself is never read: the library breaks off there. */
async function contentOf(zip: ZipFile, entry: Entry): Promise<{ bytes: Uint8Array } | { words: string }> {
  try {
    const stream = await new Promise<Readable>((resolve, reject) =>
      zip.openReadStream(entry, (error, opened) => (error ? reject(error) : resolve(opened))),
    );
    const pieces: Buffer[] = [];
    for await (const piece of stream) pieces.push(piece);
    return { bytes: new Uint8Array(Buffer.concat(pieces)) };
  } catch {
    return {
      words: "It can't be unpacked: this part of the ZIP is damaged. Send the file itself, or pack it again.",
    };
  }
}

async function open(bytes: Uint8Array): Promise<ZipFile> {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  try {
    return await new Promise<ZipFile>((resolve, reject) =>
      // Names are decoded and judged here, one by one, so that one bad name does not refuse the rest.
      fromBuffer(buffer, { lazyEntries: true, decodeStrings: false, autoClose: false }, (error, zip) =>
        error ? reject(error) : resolve(zip),
      ),
    );
  } catch {
    throw new NotAZip(
      "The ZIP can't be opened: it is cut short or damaged. Nothing of it was kept; pack it again.",
    );
  }
}

async function* entriesOf(zip: ZipFile): AsyncGenerator<Entry> {
  for (;;) {
    const next = await new Promise<Entry | null>((resolve, reject) => {
      const done = () => {
        zip.removeListener("entry", onEntry);
        zip.removeListener("end", onEnd);
        zip.removeListener("error", onError);
      };
      const onEntry = (entry: Entry) => [done(), resolve(entry)];
      const onEnd = () => [done(), resolve(null)];
      const onError = () => [
        done(),
        reject(new NotAZip("The list of files in the ZIP is damaged. Pack it again.")),
      ];
      zip.on("entry", onEntry).on("end", onEnd).on("error", onError);
      zip.readEntry();
    });
    if (!next) return;
    yield next;
  }
}

/** UTF-8 where it says so or is so, else byte for byte. */
function nameOf(entry: Entry): string {
  const raw = entry.fileName as unknown as Buffer;
  const text = raw.toString("utf8");
  return text.includes("\ufffd") ? raw.toString("latin1") : text;
}

function megabytes(bytes: number): number {
  return Math.ceil(bytes / 1024 / 1024);
}

const NESTED = "It is a ZIP within the ZIP. Unpack it first, and send what is in it.";
/** Deflate packs a text of numbers 3 to 20 times, a flat line of them up to about 100 times. */
const MOST_RATIO = 200;
const RATIO_FROM_BYTES = 1024 * 1024;
const MOST_IN_LIST = 5000;
