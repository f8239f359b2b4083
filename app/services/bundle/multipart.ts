/**
 * The first file of a multipart form as a stream (RFC 7578), for files that are too large to be held; fields before it are
 * passed over. Null where the body has no file, or is no such form; a body that is cut short throws while it is read.
 */
export async function fileOfForm(
  body: AsyncIterable<Uint8Array>,
  contentType: string,
): Promise<{ name: string; bytes: AsyncGenerator<Buffer> } | null> {
  const boundary = /^multipart\/form-data;.*\bboundary=(?:"([^"]{1,70})"|([^\s;"]{1,70}))/i.exec(contentType);
  if (!boundary) return null;
  const cutter = new Cutter(body[Symbol.asyncIterator](), Buffer.from(`\r\n--${boundary[1] ?? boundary[2]}`));
  if ((await cutter.collect(cutter.delimiter)) === null) return null;
  for (;;) {
    const head = (await cutter.collect(HEAD_END))?.toString("utf8");
    if (head === undefined || head.startsWith("--")) return null;
    const name = /content-disposition:[^\r\n]*\bfilename="((?:[^"\\]|\\.)*)"/i.exec(head)?.[1];
    if (name !== undefined && name !== "") return { name, bytes: cutter.until(cutter.delimiter) };
    if ((await cutter.collect(cutter.delimiter)) === null) return null;
  }
}

/** The body ended before its form did: whoever sent it is to send it again. */
export class CutShort extends Error {}

/** Cuts a stream at marks, holding no more of it than a mark is long and a chunk. */
class Cutter {
  private held = Buffer.from("\r\n");
  private ended = false;

  constructor(
    private readonly chunks: AsyncIterator<Uint8Array>,
    readonly delimiter: Buffer,
  ) {}

  /** Everything to the mark, which is passed over. Throws where the stream ends before it. */
  async *until(mark: Buffer): AsyncGenerator<Buffer> {
    for (;;) {
      const at = this.held.indexOf(mark);
      if (at >= 0) {
        const bytes = this.held.subarray(0, at);
        this.held = this.held.subarray(at + mark.length);
        if (bytes.length > 0) yield bytes;
        return;
      }
      const safe = this.held.length - mark.length;
      if (safe > 0) {
        const bytes = this.held.subarray(0, safe);
        this.held = this.held.subarray(safe);
        yield bytes;
      }
      if (this.ended) throw new CutShort("The form was cut short on its way.");
      const { value, done } = await this.chunks.next();
      if (done) this.ended = true;
      else this.held = Buffer.concat([this.held, value]);
    }
  }

  /** The same as one piece, which must be small; null where the stream ends before the mark. */
  async collect(mark: Buffer): Promise<Buffer | null> {
    const pieces: Buffer[] = [];
    let size = 0;
    try {
      for await (const piece of this.until(mark)) {
        pieces.push(piece);
        size += piece.length;
        if (size > MOST_SMALL) return null;
      }
    } catch {
      return null;
    }
    return Buffer.concat(pieces);
  }
}

const HEAD_END = Buffer.from("\r\n\r\n");
const MOST_SMALL = 64 * 1024;
