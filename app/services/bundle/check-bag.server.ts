import { createHash } from "node:crypto";
import type { Readable } from "node:stream";
import { crc32 } from "node:zlib";
import { readBagInfo, readManifest } from "./bag.ts";
import type { OpenBag } from "./open-zip.server.ts";
import { BUNDLE_FORMAT } from "./readme.ts";
import { Refused } from "./refused.ts";

/** Path of the payload → its SHA-256 and size: what later steps trust. */
export type Checked = Map<string, { sha256: string; bytes: number }>;

/**
 * Whether the bag is whole and what it says it is (RFC 8493, section 3): every file is named in every manifest and the
 * other way round, and has the sums that stand there. `told` hears after each file. Throws `Refused`.
 */
export async function checkBag(
  bag: OpenBag,
  told: (done: number, all: number) => Promise<void>,
): Promise<Checked> {
  if (!/^BagIt-Version: *1\.0\r?\n/.test(await textOf(bag, "bagit.txt"))) {
    throw new Refused("Its bagit.txt names a version of BagIt that is not known here (1.0 is).");
  }
  if (bag.entries.has("fetch.txt")) {
    throw new Refused(
      "It wants files to be fetched from elsewhere. Nothing is: give a bundle that has all its files.",
    );
  }
  for (const name of ["manifest-sha256.txt", "bag-info.txt", "tagmanifest-sha256.txt"]) {
    if (!bag.entries.has(name)) throw new Refused(`It has no ${name}, so nothing says whether it is whole.`);
  }
  const info = readBagInfo(await textOf(bag, "bag-info.txt"));
  const format = info.get("swale-bundle-format");
  if (format === undefined) throw new Refused("It is a BagIt bag, but not a bundle of a project.");
  if (format !== String(BUNDLE_FORMAT)) {
    throw new Refused(
      `It has format ${format.slice(0, 20)}, and ${BUNDLE_FORMAT} is known here: it was made by a later version.`,
    );
  }
  const wanted = await manifestsOf(bag);
  return sumsOf(bag, wanted, told);
}

type Wanted = Map<string, { sha256?: string; sha512?: string }>;

async function manifestsOf(bag: OpenBag): Promise<Wanted> {
  const wanted: Wanted = new Map();
  for (const name of [...bag.entries.keys()].filter((path) => /^(tag)?manifest-/.test(path))) {
    const method = /^(?:tag)?manifest-(sha256|sha512)\.txt$/.exec(name)?.[1] as
      | "sha256"
      | "sha512"
      | undefined;
    if (!method) throw new Refused(`${name} has sums of a kind that is not read here.`);
    const sums = readManifest(await textOf(bag, name));
    if (!sums) throw new Refused(`${name} has a line that is no sum, or names a file twice.`);
    const ofPayload = name.startsWith("manifest");
    for (const [path, sum] of sums) {
      if (path.startsWith("data/") !== ofPayload)
        throw new Refused(`${name} names “${path.slice(0, 80)}”, which is not its to name.`);
      if (!bag.entries.has(path))
        throw new Refused(`“${path.slice(0, 80)}” is named in ${name} and is not there.`);
      const of = wanted.get(path) ?? {};
      of[method] = sum;
      wanted.set(path, of);
    }
    if (!ofPayload) continue;
    for (const path of bag.entries.keys()) {
      if (path.startsWith("data/") && !sums.has(path))
        throw new Refused(`“${path}” is there and not named in ${name}.`);
    }
  }
  for (const path of bag.entries.keys()) {
    if (!path.startsWith("data/") && !wanted.has(path) && !path.startsWith("tagmanifest-")) {
      throw new Refused(`“${path}” is there and named nowhere.`);
    }
  }
  return wanted;
}

async function sumsOf(
  bag: OpenBag,
  wanted: Wanted,
  told: (done: number, all: number) => Promise<void>,
): Promise<Checked> {
  const checked: Checked = new Map();
  const faults: string[] = [];
  let done = 0;
  for (const [path, sums] of wanted) {
    const hashes = { sha256: createHash("sha256"), sha512: createHash("sha512") };
    let bytes = 0;
    let crc = 0;
    for await (const chunk of await opened(bag, path)) {
      hashes.sha256.update(chunk);
      if (sums.sha512) hashes.sha512.update(chunk);
      crc = crc32(chunk, crc);
      bytes += chunk.length;
    }
    const sha256 = hashes.sha256.digest("hex");
    const same =
      (sums.sha256 === undefined || sums.sha256 === sha256) &&
      (sums.sha512 === undefined || sums.sha512 === hashes.sha512.digest("hex")) &&
      crc === bag.entries.get(path)?.crc32;
    if (!same) faults.push(`“${path}” is not what it was when the bundle was made: its sum differs.`);
    if (path.startsWith("data/")) checked.set(path, { sha256, bytes });
    await told(++done, wanted.size);
  }
  if (faults.length > 0) throw new Refused(faults);
  return checked;
}

/** The entry's bytes; a damaged one is refused in words. */
async function* opened(bag: OpenBag, path: string): AsyncGenerator<Buffer> {
  try {
    for await (const chunk of (await bag.read(path)) as Readable) yield chunk as Buffer;
  } catch (error) {
    if (error instanceof Refused) throw error;
    throw new Refused(`“${path}” can't be unpacked: the ZIP is damaged.`);
  }
}

/** A small text of the bag. */
async function textOf(bag: OpenBag, path: string): Promise<string> {
  if ((bag.entries.get(path)?.uncompressedSize ?? 0) > MOST_TEXT)
    throw new Refused(`${path} is too long to be one.`);
  const chunks: Buffer[] = [];
  for await (const chunk of opened(bag, path)) chunks.push(chunk);
  return Buffer.concat(chunks).toString("utf8");
}

const MOST_TEXT = 64 * 1024 * 1024;
