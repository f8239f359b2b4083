import { StringDecoder } from "node:string_decoder";
import { isEntry, type PlanEntry, type PlanLine } from "./plan.ts";

/** The lines of a stream of UTF-8, without their ends; one that is longer than `most` characters is a fault. */
export async function* linesOf(chunks: AsyncIterable<Uint8Array>, most = LONGEST): AsyncGenerator<string> {
  const decoder = new StringDecoder("utf8");
  // A line may come in thousands of pieces: they are put together once.
  let pieces: string[] = [];
  let length = 0;
  for await (const chunk of chunks) {
    const text = decoder.write(Buffer.from(chunk.buffer, chunk.byteOffset, chunk.length));
    let start = 0;
    for (let end = text.indexOf("\n"); end >= 0; end = text.indexOf("\n", start)) {
      const line = pieces.length > 0 ? pieces.join("") + text.slice(start, end) : text.slice(start, end);
      [pieces, length] = [[], 0];
      yield line.endsWith("\r") ? line.slice(0, -1) : line;
      start = end + 1;
    }
    if (start === text.length) continue;
    pieces.push(text.slice(start));
    length += text.length - start;
    if (length > most) throw new LineTooLong(`a line is longer than ${most} characters`);
  }
  const rest = pieces.join("") + decoder.end();
  if (rest !== "") yield rest;
}

export class LineTooLong extends Error {}

/** Reads a plan entry by entry; the text of one is read while it is written. */
export class PlanReader {
  private readonly lines: AsyncIterator<string>;
  private ahead: PlanLine | null = null;

  constructor(chunks: AsyncIterable<Uint8Array>) {
    this.lines = linesOf(chunks)[Symbol.asyncIterator]();
  }

  /** The next entry, whatever is left of the text before it. */
  async next(): Promise<PlanEntry | null> {
    for (;;) {
      const line = await this.read();
      if (line === null) return null;
      if (isEntry(line)) return line;
    }
  }

  async *texts(): AsyncGenerator<Buffer> {
    for (;;) {
      const line = await this.read();
      if (line === null) return;
      if (isEntry(line)) {
        this.ahead = line;
        return;
      }
      yield Buffer.from(line.text);
    }
  }

  private async read(): Promise<PlanLine | null> {
    const ahead = this.ahead;
    this.ahead = null;
    if (ahead) return ahead;
    const { value, done } = await this.lines.next();
    return done ? null : (JSON.parse(value) as PlanLine);
  }
}

const LONGEST = 32 * 1024 * 1024;
