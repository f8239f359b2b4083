import { createHash } from "node:crypto";
import { basename } from "node:path";
import { analyse } from "../../app/measurement/analyse.ts";
import { renormalise } from "../../app/measurement/renormalise.ts";
import type { Sweep, Warning } from "../../app/measurement/sweep.ts";
import { type PictureReader, readAny, type SweepFile } from "../../app/readers/read.ts";
import { type Given, MAX_FILE_BYTES } from "../../app/readers/reading.ts";
import type { PictureDetails } from "../../app/readers/screenshot/read-picture.ts";
import { closePictureReader, readPictureFile } from "../../app/services/picture.server.ts";
import { correct, type Done } from "./correction.ts";
import { type Options, parseOptions, USAGE, UsageError } from "./options.ts";
import { bytesOf, readLevels, readReferences } from "./read-reference.ts";
import { type AnalysedFile, type FailedFile, failedRow, jsonRow } from "./rows.ts";
import { table } from "./table.ts";

/** Where the command writes: answers and complaints. */
interface Output {
  out(text: string): void;
  err(text: string): void;
}

/**
 * The command `analyse` with its arguments: reads and analyses files with no server or database. Exit code: 0 all
 * read, 1 at least one could not be, 2 usage.
 */
export async function analyseCommand(args: string[], { out, err }: Output): Promise<number> {
  if (args.includes("--help")) {
    out(`${USAGE}\n`);
    return 0;
  }
  let options: Options;
  try {
    options = parseOptions(args);
  } catch (error) {
    if (!(error instanceof UsageError)) throw error;
    err(`${error.message}\n${USAGE}\n`);
    return 2;
  }
  let code = 0;
  for (const path of options.files) {
    const answer = await analyseFile(path, options);
    if ("error" in answer) code = 1;
    out(`${options.json ? json(answer, options) : plain(answer)}\n`);
  }
  await closePictureReader();
  return code;
}

async function analyseFile(
  path: string,
  { given, settings, systemOhm, correction: asked }: Options,
): Promise<AnalysedFile | FailedFile> {
  const file = basename(path);
  const bytes = await bytesOf(path);
  if (typeof bytes === "string") return { file, error: { code: "no-file", message: bytes } };
  if (bytes === null)
    return {
      file,
      error: { code: "too-large", message: `The file is larger than ${MAX_FILE_BYTES / 2 ** 20} MB.` },
    };
  const sha256 = createHash("sha256").update(bytes).digest("hex");
  let picture: PictureDetails | undefined;
  const readAPicture: PictureReader = async (pictureFile, pictureGiven) => {
    const read = await readPictureFile(pictureFile, pictureGiven);
    picture = read.picture;
    return read;
  };
  const own = (one: SweepFile, with_: Given) => readAny(one, with_, { picture: readAPicture });
  const ratio = asked?.references.open !== undefined || asked?.references.short !== undefined;
  const result = ratio
    ? await readLevels({ name: file, bytes }, given, own)
    : await own({ name: file, bytes }, given);
  if (!result.ok) return { file, sha256, error: result.problem, ...(picture ? { picture } : {}) };
  let done: Done | null = null;
  if (asked) {
    const references = await readReferences(asked.references, result.reading, given, (one, with_) =>
      readAny(one, with_, { picture: readPictureFile }),
    );
    if ("message" in references) return { file, sha256, error: references };
    done = correct(result.sweep, result.reading, references, asked);
  }
  const judged = inOhm(done?.sweep ?? result.sweep, systemOhm);
  const analysis = analyse(judged, settings);
  const warnings = distinct([
    ...result.warnings,
    ...(done?.warnings ?? []),
    ...referenceWarning(result.sweep.referenceOhm, systemOhm, judged),
    ...analysis.warnings,
  ]);
  return {
    file,
    sha256,
    reading: result.reading,
    sweep: result.sweep,
    analysis,
    warnings,
    ...(done ? { done } : {}),
    ...(picture ? { picture } : {}),
  };
}

/** Brought to another reference; limits hold for the file's own and don't go along. */
function inOhm(sweep: Sweep, systemOhm: number): Sweep {
  const brought = renormalise(sweep, systemOhm);
  if (brought.referenceOhm === sweep.referenceOhm) return sweep;
  const { benchLimits: _limits, ...rest } = brought;
  return rest;
}

/** Findings hold for the reference that was asked for, 50 Ω unless told; without phase they can't be brought there. */
function referenceWarning(fileOhm: number, systemOhm: number, judged: Sweep): Warning[] {
  if (fileOhm === systemOhm) return [];
  const message =
    judged.referenceOhm === systemOhm
      ? `The file is referred to ${fileOhm} Ω. The dips are those seen from ${systemOhm} Ω, converted through the impedance; --reference-ohm ${fileOhm} gives them for ${fileOhm} Ω.`
      : `The file is referred to ${fileOhm} Ω and has no phase: the dips are those seen from ${fileOhm} Ω.`;
  return [{ code: "other-reference", message }];
}

function distinct(warnings: Warning[]): Warning[] {
  return warnings.filter(
    (w, i) => warnings.findIndex((other) => other.code === w.code && other.message === w.message) === i,
  );
}

function json(answer: AnalysedFile | FailedFile, { points }: Options): string {
  return JSON.stringify("error" in answer ? failedRow(answer) : jsonRow(answer, points));
}

function plain(answer: AnalysedFile | FailedFile): string {
  if (!("error" in answer)) return table(answer);
  const { message, line, column } = answer.error;
  const where =
    line === undefined ? "" : ` (line ${line}${column === undefined ? "" : `, column ${column}`})`;
  return `${answer.file}\n  not read: ${message}${where}`;
}
