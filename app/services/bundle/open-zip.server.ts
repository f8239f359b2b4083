import type { Readable } from "node:stream";
import yauzl, { type Entry, type ZipFile } from "yauzl";
import { Refused } from "./refused.ts";

/** A ZIP whose list of entries was found harmless; nothing was unpacked yet. */
export interface OpenBag {
  /** By path below the bag's folder; folders are left out. */
  entries: Map<string, Entry>;
  read: (path: string) => Promise<Readable>;
  close: () => void;
}

/**
 * Opens a bundle and looks at its list of entries before a byte of them is unpacked. Throws `Refused` for what is no whole
 * ZIP, or has a name that leads out, a link, the same name twice (whatever its case), data that several entries share, or
 * that would unpack to more than it should.
 */
export async function openBag(file: string): Promise<OpenBag> {
  const zip = await openZip(file);
  try {
    const entries = await entriesOf(zip);
    const base = baseOf([...entries.keys()]);
    const inside = new Map<string, Entry>();
    for (const [path, entry] of entries) {
      if (!path.startsWith(base)) throw new Refused(`“${path}” lies beside the bundle's folder.`);
      inside.set(path.slice(base.length), entry);
    }
    return {
      entries: inside,
      read: (path) => {
        const entry = inside.get(path);
        if (!entry) throw new Refused(`“${path}” is not in the bundle.`);
        return zip.openReadStreamPromise(entry);
      },
      close: () => zip.close(),
    };
  } catch (error) {
    zip.close();
    throw error instanceof Refused ? error : new Refused(BROKEN);
  }
}

async function openZip(file: string): Promise<ZipFile> {
  try {
    return await yauzl.openPromise(file, {
      lazyEntries: true,
      autoClose: false,
      decodeStrings: false,
      validateEntrySizes: true,
    });
  } catch {
    throw new Refused(BROKEN);
  }
}

async function entriesOf(zip: ZipFile): Promise<Map<string, Entry>> {
  if (zip.entryCount > MOST_ENTRIES)
    throw new Refused(`The ZIP has ${zip.entryCount} entries; ${MOST_ENTRIES} are the most.`);
  const found = new Map<string, Entry>();
  const folded = new Set<string>();
  const stretches: [number, number][] = [];
  let total = 0;
  for await (const entry of zip.eachEntry()) {
    const path = nameOf(entry);
    checkEntry(path, entry);
    if (path.endsWith("/")) continue;
    const key = path.normalize("NFC").toLowerCase();
    if (folded.has(key))
      throw new Refused(`“${path}” is there twice, or differs from another name only in capitals.`);
    folded.add(key);
    found.set(path, entry);
    total += entry.uncompressedSize;
    stretches.push([entry.relativeOffsetOfLocalHeader, entry.compressedSize]);
    if (total > MOST_UNPACKED)
      throw new Refused(`It would unpack to more than ${MOST_UNPACKED / 2 ** 30} GB.`);
  }
  if (total > SMALL && total > zip.fileSize * MOST_RATIO_ALL) {
    throw new Refused(
      `It would unpack to ${Math.round(total / zip.fileSize)} times its size, which no bundle does.`,
    );
  }
  stretches.sort((a, b) => a[0] - b[0]);
  for (let i = 1; i < stretches.length; i++) {
    if (stretches[i - 1][0] + stretches[i - 1][1] > stretches[i][0]) {
      throw new Refused("Entries of the ZIP share the same bytes, which no honest one does.");
    }
  }
  return found;
}

function nameOf(entry: Entry): string {
  let path: string;
  try {
    path = new TextDecoder("utf-8", { fatal: true }).decode(entry.fileNameRaw);
  } catch {
    throw new Refused("A name in the ZIP is not UTF-8.");
  }
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must not be there
  const leadsOut = /^\/|^[A-Za-z]:|\\|(^|\/)\.\.?(\/|$)|\/\/|[\u0000-\u001f\u007f]/.test(path);
  if (path === "" || leadsOut || path.length > LONGEST_NAME) {
    // biome-ignore lint/suspicious/noControlCharactersInRegex: as above
    const shown = path.slice(0, 80).replace(/[\u0000-\u001f\u007f]/g, "?");
    throw new Refused(`The name “${shown}” leads out of the bundle, or is none that every system takes.`);
  }
  return path;
}

function checkEntry(path: string, entry: Entry): void {
  const type = (entry.externalFileAttributes >>> 16) & TYPE_MASK;
  if (type !== 0 && type !== PLAIN_FILE && type !== FOLDER) {
    throw new Refused(`“${path}” is a link or a device, not a file.`);
  }
  if (entry.isEncrypted()) throw new Refused(`“${path}” is enciphered.`);
  if (entry.compressionMethod !== 0 && entry.compressionMethod !== 8) {
    throw new Refused(`“${path}” is packed in a way that is not read here.`);
  }
  if (path.endsWith("/") && entry.uncompressedSize > 0)
    throw new Refused(`“${path}” is a folder with bytes.`);
  if (entry.uncompressedSize > SMALL && entry.uncompressedSize > entry.compressedSize * MOST_RATIO) {
    throw new Refused(
      `“${path}” would unpack to ${Math.round(entry.uncompressedSize / Math.max(1, entry.compressedSize))} times its size, which nothing in a bundle does.`,
    );
  }
}

/** The one folder that holds `bagit.txt`, with a slash behind it; empty where that stands at the top. */
function baseOf(paths: string[]): string {
  const bases = paths.filter((path) => /^([^/]+\/)?bagit\.txt$/.test(path)).map((path) => path.slice(0, -9));
  if (bases.length === 0) throw new Refused("It has no bagit.txt: this is a ZIP, but not a bundle.");
  if (bases.length > 1) throw new Refused("It holds more than one bundle. Give one at a time.");
  return bases[0];
}

const BROKEN = "This is not a ZIP file, or it is cut short. Download it again and compare its size.";
const TYPE_MASK = 0o170000;
const PLAIN_FILE = 0o100000;
const FOLDER = 0o040000;
const MOST_ENTRIES = 100_000;
const LONGEST_NAME = 400;
const MOST_UNPACKED = 8 * 2 ** 30;
/** Under this nothing is a bomb. */
const SMALL = 1024 * 1024;
/** Of one entry and of the whole. Seen in bundles of ours: points pack to a third, records of many dips to a tenth or so, never under a fortieth. */
const MOST_RATIO = 200;
const MOST_RATIO_ALL = 60;
