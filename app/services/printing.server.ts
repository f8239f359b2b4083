import { fontFolder } from "./fonts.server.ts";
import type { FormsTask, MadeForm } from "./plates/make-forms.server.ts";
import { openThreads, type Threads } from "./threads.server.ts";
import type { DocumentTask } from "./write-ups/document.server.ts";

/**
 * What is drawn and set for paper, in a thread of its own, one thing after another: who asks waits, and nobody else does.
 * Bytes are those that the same work gives in place.
 */

/** So many wait already that nothing more is taken. */
export class BusyPrinting extends Error {}

/** Every form of a plate. */
export async function printForms(task: FormsTask): Promise<MadeForm[]> {
  const forms: MadeForm[] = await print("default", task);
  return forms.map((form) => ({ ...form, bytes: bufferOf(form.bytes) }));
}

/** A published write-up as a PDF. */
export async function printWriteUp(task: DocumentTask): Promise<Buffer> {
  return bufferOf(await print("printDocument", task));
}

/** Ends the thread once it has done what it is at; who waits is refused. */
export async function closePrinter(): Promise<void> {
  const open = printer;
  printer = undefined;
  await open?.close({ force: true });
}

let printer: Threads | undefined;

async function print<T>(name: "default" | "printDocument", task: unknown): Promise<T> {
  if (!printer) {
    fontFolder();
    printer = openThreads("printing", { maxThreads: 1, maxQueue: MOST_WAITING, idleTimeout: IDLE_MS });
  }
  if (printer.queueSize >= MOST_WAITING) throw new BusyPrinting("Too much waits to be printed.");
  return printer.run(task, { name, signal: AbortSignal.timeout(LONGEST_MS) });
}

/** A Buffer comes back from a thread as a plain array of bytes. */
function bufferOf({ buffer, byteOffset, byteLength }: Uint8Array): Buffer {
  return Buffer.from(buffer, byteOffset, byteLength);
}

/** A plate takes about a second, a write-up less: so nobody waits for more than about a minute. */
const MOST_WAITING = 50;
/** With the wait; what takes longer hangs, and its thread is ended. */
const LONGEST_MS = 3 * 60_000;
/** Starting anew costs a second. */
const IDLE_MS = 10 * 60_000;
