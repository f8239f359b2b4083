import { createHash } from "node:crypto";
import { Readable } from "node:stream";
import { deflateSync, inflateSync } from "node:zlib";
import * as jobs from "~/db/jobs.server";
import { findPoints } from "~/db/sweeps.server";
import { toTouchstone } from "../exports.server.ts";
import { decodePoints } from "../points.server.ts";
import { deleteObject } from "../storage.server.ts";
import { bagDeclaration, bagInfo, manifestOf, type Sums } from "./bag.ts";
import type { Lease } from "./lease.server.ts";
import { PlanReader } from "./lines.ts";
import { isEntry, type PlanEntry, type PlanLine } from "./plan.ts";
import { pointsToCsv } from "./points-csv.ts";
import { Refused } from "./refused.ts";
import { abortUpload, PartUpload, putStream, readPieces, type UploadState } from "./store.server.ts";
import { type Chunks, writeDirectory, writeEntry, type ZipState } from "./zip-writer.ts";

export interface Making {
  /** The folder inside the ZIP, and the ZIP's name. */
  name: string;
  about: Record<string, string>;
  /** Everything that goes in, of one moment. Called once; what it gave is kept. */
  plan: () => AsyncGenerator<PlanLine>;
}

/** What a run needs to go on in another process: after the last part that was sent at the end of a whole entry. */
interface Resume {
  upload: UploadState;
  zip: ZipState;
  sums: Sums[];
  /** Entries of the plan that are in. */
  done: number;
}

/**
 * Makes a bundle: first its plan, which is kept, then from that the ZIP, sent in parts as it is written. After any part
 * that ends with an entry the run can go on from there, so a process that dies costs a few megabytes of work.
 */
export async function makeBundle(lease: Lease, making: Making): Promise<void> {
  const { run } = lease;
  const keys = keysOf(run.publicId);
  let state = run.resume && (JSON.parse(inflateSync(run.resume).toString()) as Resume);
  let allParts = run.allParts;
  if (!state) {
    allParts = await keepPlan(lease, keys.plan, making);
    const upload = await PartUpload.begin(keys.bundle, "application/zip");
    state = { upload: upload.state, zip: { offset: 0, entries: [] }, sums: [], done: 0 };
    await lease.keep({ allParts, doneParts: 0, resume: packed(state) });
  }
  const upload = PartUpload.resume(keys.bundle, state.upload);
  const { zip, sums } = state;
  const sink = (bytes: Buffer) => upload.write(bytes);
  const put = async (path: string, chunks: Chunks, compressed: boolean) => {
    const sum = summed(path, chunks);
    await writeEntry(
      zip,
      { path: `${making.name}/${path}`, packed: compressed, at: run.createdAt },
      sum.chunks,
      sink,
    );
    return sum.done();
  };
  const reader = new PlanReader(readPieces(keys.plan));
  for (let i = 0; i < state.done; i++) await reader.next();
  for (let entry = await reader.next(); entry; entry = await reader.next()) {
    const sum = await put(entry.path, await chunksOf(entry, reader), entry.from !== "object");
    if (entry.from === "object" && entry.sha256 !== null && entry.sha256 !== sum.sha256) {
      throw new Error(`The store gave other bytes for ${entry.path} than were put there.`);
    }
    sums.push(sum);
    state.done++;
    if (await upload.settle()) await lease.keep({ doneParts: state.done, resume: packed(state) });
    else await lease.tell({ doneParts: state.done });
  }
  const payload = sums.slice();
  const tags: Sums[] = [];
  const tag = async (path: string, text: string) =>
    void tags.push(await put(path, [Buffer.from(text)], true));
  const payloadBytes = payload.reduce((sum, { bytes }) => sum + bytes, 0);
  await tag("bagit.txt", bagDeclaration());
  await tag("bag-info.txt", bagInfo(making.about, payloadBytes, payload.length, run.createdAt));
  for (const method of ["sha256", "sha512"] as const) {
    await tag(`manifest-${method}.txt`, manifestOf(payload, method));
  }
  const tagged = tags.slice();
  for (const method of ["sha256", "sha512"] as const) {
    await tag(`tagmanifest-${method}.txt`, manifestOf(tagged, method));
  }
  await writeDirectory(zip, run.createdAt, sink);
  await upload.finish();
  const expiresAt = new Date(Date.now() + KEPT_MS);
  await jobs.insert("delete-object", { key: keys.bundle }, new Date(expiresAt.getTime() + 1000));
  await lease.keep({
    state: "done",
    doneParts: allParts,
    resume: null,
    storageKey: keys.bundle,
    report: { name: `${making.name}.zip`, sizeBytes: zip.offset, files: payload.length, payloadBytes },
    expiresAt,
  });
  await deleteObject(keys.plan);
}

/** Takes away what a run that is given up, or begun anew, has in the store. */
export async function dropMade(publicId: string, resume: Buffer | null): Promise<void> {
  const keys = keysOf(publicId);
  if (resume) {
    const { upload } = JSON.parse(inflateSync(resume).toString()) as Resume;
    await abortUpload(keys.bundle, upload.uploadId);
  }
  await deleteObject(keys.plan);
}

/** Writes the plan down whole; answers how many entries it has. */
async function keepPlan(lease: Lease, key: string, making: Making): Promise<number> {
  await jobs.insert("delete-object", { key }, new Date(Date.now() + KEPT_MS));
  let entries = 0;
  const beat = setInterval(() => void lease.keep().catch(() => undefined), BEAT_MS);
  try {
    const lines = async function* () {
      for await (const line of making.plan()) {
        if (isEntry(line)) entries++;
        yield Buffer.from(`${JSON.stringify(line)}\n`);
      }
    };
    await putStream(key, Readable.from(lines(), { objectMode: false }), "application/x-ndjson");
  } finally {
    clearInterval(beat);
  }
  if (entries > MOST_ENTRIES)
    throw new Refused(`The bundle would have ${entries} files; ${MOST_ENTRIES} are the most. None was made.`);
  return entries;
}

async function chunksOf(entry: PlanEntry, reader: PlanReader): Promise<Chunks> {
  switch (entry.from) {
    case "text":
      return reader.texts();
    case "object":
      return readPieces(entry.key);
    case "points": {
      const sweep = decodePoints(await findPoints(entry.reading));
      return entry.as === "csv"
        ? encoded(pointsToCsv(sweep))
        : encoded([toTouchstone(sweep, [`Sweep ${entry.title}`])]);
    }
    case "preview":
      return encoded(pointsToCsv(decodePoints([Buffer.from(entry.preview, "base64")])));
    default:
      return entry satisfies never;
  }
}

function* encoded(texts: Iterable<string>): Generator<Buffer> {
  for (const text of texts) yield Buffer.from(text);
}

/** The chunks as they are, and their sums once they have gone by. */
function summed(path: string, chunks: Chunks): { chunks: Chunks; done: () => Sums } {
  const sha256 = createHash("sha256");
  const sha512 = createHash("sha512");
  let bytes = 0;
  const pass = async function* () {
    for await (const chunk of chunks) {
      sha256.update(chunk);
      sha512.update(chunk);
      bytes += chunk.length;
      yield chunk;
    }
  };
  return {
    chunks: pass(),
    done: () => ({ path, bytes, sha256: sha256.digest("hex"), sha512: sha512.digest("hex") }),
  };
}

function keysOf(publicId: string) {
  return { plan: `bundles/${publicId}/plan`, bundle: `bundles/${publicId}/bundle.zip` };
}

function packed(state: Resume): Buffer {
  return deflateSync(JSON.stringify(state), { level: 1 });
}

const DAY_MS = 24 * 60 * 60 * 1000;
export const KEPT_DAYS = 7;
const KEPT_MS = KEPT_DAYS * DAY_MS;
const BEAT_MS = 10_000;
/** What is kept to go on with grows by about 200 bytes an entry and must stay within a packet of the database (16 MB). */
const MOST_ENTRIES = 60_000;
