import { readFile, stat } from "node:fs/promises";
import { basename } from "node:path";
import type { SweepFile } from "../../app/readers/read.ts";
import type { Given, Reading, ReadProblem, ReadResult } from "../../app/readers/reading.ts";
import { MAX_FILE_BYTES } from "../../app/readers/reading.ts";
import { type ReadReference, ROLES, type Role } from "./correction.ts";

type Read = (file: SweepFile, given: Given) => Promise<ReadResult>;

/** The file's bytes, null where there are too many, or a sentence where it can't be opened. */
export async function bytesOf(path: string): Promise<Uint8Array | string | null> {
  try {
    const { size } = await stat(path);
    return size > MAX_FILE_BYTES ? null : await readFile(path);
  } catch (error) {
    return `${path} could not be opened: ${(error as NodeJS.ErrnoException).code ?? (error as Error).message}.`;
  }
}

/** Reads levels with their 0 dB line at 0 dB, for a ratio to references that are read alike; all else as it is. */
export async function readLevels(file: SweepFile, given: Given, read: Read): Promise<ReadResult> {
  const result = await read(file, given);
  if (result.ok || result.problem.code !== "zero-db-needed") return result;
  return read(file, {
    ...given,
    text: { ...given.text, zeroDb: 0 },
    screenshot: { ...given.screenshot, zeroDb: 0 },
  });
}

/**
 * The references that were named, read like the sweep's own file: with the same givens, and in the same quantity where
 * a text has the same columns. The first that can't be read is the problem.
 */
export async function readReferences(
  paths: Partial<Record<Role, string>>,
  like: Reading,
  given: Given,
  read: Read,
): Promise<Partial<Record<Role, ReadReference>> | ReadProblem> {
  const references: Partial<Record<Role, ReadReference>> = {};
  for (const role of ROLES) {
    const path = paths[role];
    if (path === undefined) continue;
    const bytes = await bytesOf(path);
    const failed = (message: string): ReadProblem => ({
      code: "reference-unread",
      message: `The ${role}, ${basename(path)}, could not be read, so nothing was corrected. ${message}`,
    });
    if (typeof bytes === "string") return failed(bytes);
    if (bytes === null) return failed(`It is larger than ${MAX_FILE_BYTES / 2 ** 20} MB.`);
    const file = { name: basename(path), bytes };
    let result = await readLevels(file, given, read);
    if (result.ok && differs(result.reading, like)) {
      const quantity = like.spec.text?.quantity;
      result = await readLevels(file, { ...given, text: { ...given.text, quantity } }, read);
    }
    if (!result.ok) return failed(result.problem.message);
    references[role] = result;
  }
  return references;
}

/** Same columns, but taken for another quantity: values of a reference alone can look like something else. */
function differs(reading: Reading, like: Reading): boolean {
  return (
    reading.format === "text" &&
    like.format === "text" &&
    reading.shape === like.shape &&
    reading.spec.text?.quantity !== like.spec.text?.quantity
  );
}
