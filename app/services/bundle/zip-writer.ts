import { pipeline, Readable } from "node:stream";
import { crc32, createDeflateRaw } from "node:zlib";

/**
 * A ZIP written from front to back, with nothing held but a line for each entry; what is kept of it (`state`) is enough to go
 * on after any whole entry in another process. Sizes follow their data (bit 3), names are UTF-8 (bit 11), and beyond 65,535
 * entries or 4 GB the 64-bit records are added. No entry may have 4 GB.
 * Source of the layout: PKWARE, .ZIP File Format Specification (APPNOTE), sections 4.3 and 4.5 (from memory, not seen).
 */
export interface ZipState {
  /** Bytes written so far. */
  offset: number;
  entries: ZipEntry[];
}

export interface ZipEntry {
  path: string;
  crc: number;
  packedBytes: number;
  bytes: number;
  offset: number;
  packed: boolean;
}

export type Sink = (bytes: Buffer) => Promise<void>;
export type Chunks = AsyncIterable<Uint8Array> | Iterable<Uint8Array>;

/** Writes one entry, deflated when `packed`. */
export async function writeEntry(
  state: ZipState,
  entry: { path: string; packed: boolean; at: Date },
  chunks: Chunks,
  sink: Sink,
): Promise<void> {
  const name = Buffer.from(entry.path);
  const head = Buffer.alloc(30);
  head.writeUInt32LE(LOCAL, 0);
  head.writeUInt16LE(VERSION, 4);
  head.writeUInt16LE(FLAGS, 6);
  head.writeUInt16LE(entry.packed ? DEFLATED : STORED, 8);
  head.writeUInt32LE(dosTime(entry.at), 10);
  head.writeUInt16LE(name.length, 26);
  const seen = { crc: 0, bytes: 0 };
  const raw = counted(chunks, seen);
  const offset = state.offset;
  let packedBytes = 0;
  await sink(Buffer.concat([head, name]));
  for await (const chunk of entry.packed ? deflated(raw) : raw) {
    packedBytes += chunk.length;
    await sink(Buffer.from(chunk.buffer, chunk.byteOffset, chunk.length));
  }
  if (seen.bytes > MOST_BYTES || packedBytes > MOST_BYTES) {
    throw new Error(`${entry.path} has 4 GB or more, which one entry of a ZIP can't hold here.`);
  }
  const tail = Buffer.alloc(16);
  tail.writeUInt32LE(DESCRIPTOR, 0);
  tail.writeUInt32LE(seen.crc, 4);
  tail.writeUInt32LE(packedBytes, 8);
  tail.writeUInt32LE(seen.bytes, 12);
  await sink(tail);
  state.offset = offset + head.length + name.length + packedBytes + tail.length;
  state.entries.push({
    path: entry.path,
    crc: seen.crc,
    packedBytes,
    bytes: seen.bytes,
    offset,
    packed: entry.packed,
  });
}

/** Writes what stands at the end: the list of entries. */
export async function writeDirectory(state: ZipState, at: Date, sink: Sink): Promise<void> {
  const start = state.offset;
  for (const entry of state.entries) {
    const record = directoryRecord(entry, at);
    state.offset += record.length;
    await sink(record);
  }
  const bytes = state.offset - start;
  const count = state.entries.length;
  const end = Buffer.alloc(22);
  end.writeUInt32LE(END, 0);
  end.writeUInt16LE(Math.min(count, 0xffff), 8);
  end.writeUInt16LE(Math.min(count, 0xffff), 10);
  end.writeUInt32LE(Math.min(bytes, 0xffffffff), 12);
  end.writeUInt32LE(Math.min(start, 0xffffffff), 16);
  const large = count >= 0xffff || start >= 0xffffffff || bytes >= 0xffffffff;
  const all = large ? Buffer.concat([largeEnd(start, bytes, count), end]) : end;
  state.offset += all.length;
  await sink(all);
}

function directoryRecord({ path, crc, packedBytes, bytes, offset, packed }: ZipEntry, at: Date): Buffer {
  const name = Buffer.from(path);
  const far = offset >= 0xffffffff;
  const extra = Buffer.alloc(far ? 12 : 0);
  if (far) {
    extra.writeUInt16LE(1, 0);
    extra.writeUInt16LE(8, 2);
    extra.writeBigUInt64LE(BigInt(offset), 4);
  }
  const head = Buffer.alloc(46);
  head.writeUInt32LE(DIRECTORY, 0);
  head.writeUInt16LE(MADE_BY_UNIX, 4);
  head.writeUInt16LE(far ? VERSION_64 : VERSION, 6);
  head.writeUInt16LE(FLAGS, 8);
  head.writeUInt16LE(packed ? DEFLATED : STORED, 10);
  head.writeUInt32LE(dosTime(at), 12);
  head.writeUInt32LE(crc, 16);
  head.writeUInt32LE(packedBytes, 20);
  head.writeUInt32LE(bytes, 24);
  head.writeUInt16LE(name.length, 28);
  head.writeUInt16LE(extra.length, 30);
  // A plain file that its owner may write.
  head.writeUInt32LE((0o100644 << 16) >>> 0, 38);
  head.writeUInt32LE(far ? 0xffffffff : offset, 42);
  return Buffer.concat([head, name, extra]);
}

function largeEnd(start: number, bytes: number, count: number): Buffer {
  const record = Buffer.alloc(56 + 20);
  record.writeUInt32LE(END_64, 0);
  record.writeBigUInt64LE(44n, 4);
  record.writeUInt16LE(MADE_BY_UNIX, 12);
  record.writeUInt16LE(VERSION_64, 14);
  record.writeBigUInt64LE(BigInt(count), 24);
  record.writeBigUInt64LE(BigInt(count), 32);
  record.writeBigUInt64LE(BigInt(bytes), 40);
  record.writeBigUInt64LE(BigInt(start), 48);
  record.writeUInt32LE(LOCATOR_64, 56);
  record.writeBigUInt64LE(BigInt(start + bytes), 64);
  record.writeUInt32LE(1, 72);
  return record;
}

async function* counted(chunks: Chunks, seen: { crc: number; bytes: number }): AsyncGenerator<Uint8Array> {
  for await (const chunk of chunks) {
    seen.crc = crc32(chunk, seen.crc);
    seen.bytes += chunk.length;
    yield chunk;
  }
}

function deflated(chunks: AsyncIterable<Uint8Array>): AsyncIterable<Buffer> {
  const deflate = createDeflateRaw({ level: 6 });
  // A fault of the source comes out of the loop that reads `deflate`.
  pipeline(Readable.from(chunks), deflate, () => undefined);
  return deflate;
}

/** Time and day as DOS wrote them, UTC here. */
function dosTime(at: Date): number {
  const time = (at.getUTCHours() << 11) | (at.getUTCMinutes() << 5) | (at.getUTCSeconds() >> 1);
  const day = ((at.getUTCFullYear() - 1980) << 9) | ((at.getUTCMonth() + 1) << 5) | at.getUTCDate();
  return ((day << 16) | time) >>> 0;
}

const LOCAL = 0x04034b50;
const DESCRIPTOR = 0x08074b50;
const DIRECTORY = 0x02014b50;
const END = 0x06054b50;
const END_64 = 0x06064b50;
const LOCATOR_64 = 0x07064b50;
const VERSION = 20;
const VERSION_64 = 45;
const MADE_BY_UNIX = (3 << 8) | VERSION_64;
/** Sizes after the data; names in UTF-8. */
const FLAGS = 0x0808;
const STORED = 0;
const DEFLATED = 8;
const MOST_BYTES = 0xfffffffe;
