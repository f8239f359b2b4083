import type { ProjectAccess } from "~/auth/require.server";
import { brokenForm, refused } from "~/errors";
import { usableBenchId } from "~/services/bench-sweeps.server";
import { type Taken, takeIn } from "~/services/intake.server";
import { log } from "~/services/log.server";
import type { PictureStage } from "~/services/seen-picture";
import { roughFrequency } from "./words";

/** What became of one file, ready to be shown. */
export interface UploadResult {
  name: string;
  kind: Taken["kind"] | "failed";
  title: string;
  message: string;
  /** Where to go on; null where nothing was stored. */
  href: string | null;
}

/** The form with its files; one that was cut short on its way is refused plainly. */
export async function readUploadForm(request: Request): Promise<FormData> {
  try {
    return await request.formData();
  } catch {
    throw brokenForm();
  }
}

/** Takes the files of a form in, one after another; one that fails does not stop the others. */
export async function takeUploads(
  access: ProjectAccess,
  form: FormData,
  progress?: (stage: PictureStage) => void,
): Promise<UploadResult[]> {
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const files = form
    .getAll("files")
    .filter((entry): entry is File => entry instanceof File && entry.name !== "");
  const bench = String(form.get("bench") ?? "");
  const benchId = bench ? await usableBenchId(bench, project.id) : null;
  if (benchId === undefined)
    throw refused("There is no such bench that can be used here. Nothing was stored.");
  const results: UploadResult[] = [];
  for (const file of files.slice(0, MOST_FILES)) {
    try {
      const bytes = new Uint8Array(await file.arrayBuffer());
      const taken = await takeIn({
        project,
        by: person,
        file: { name: file.name, bytes },
        keepUnread: true,
        benchId,
        progress,
      });
      results.push(describe(file.name, project.publicId, taken));
    } catch (error) {
      log.error({ err: error, name: file.name }, "a file could not be taken in");
      results.push({
        name: file.name,
        kind: "failed",
        title: file.name,
        message: "Something failed here while the file was taken in. Nothing of it was kept; send it again.",
        href: null,
      });
    }
  }
  for (const file of files.slice(MOST_FILES)) {
    results.push({
      name: file.name,
      kind: "failed",
      title: file.name,
      message: `At most ${MOST_FILES} files go at once. This one was not stored; send it in the next go.`,
      href: null,
    });
  }
  return results;
}

function describe(name: string, project: string, taken: Taken): UploadResult {
  switch (taken.kind) {
    case "read": {
      const dips = taken.dipCount === 1 ? "1 dip" : `${taken.dipCount || "no"} dips`;
      const ask = taken.questions > 0 ? " The file leaves something open; look at its reading." : "";
      const how =
        taken.halfColumnHz === null
          ? "Read"
          : `Read from a picture, half a pixel being ${roughFrequency(taken.halfColumnHz)}`;
      return {
        name,
        kind: "read",
        title: taken.title,
        message: `${how}; ${dips} found.${ask}`,
        href: `/projects/${project}/sweeps/${taken.sweepPublicId}`,
      };
    }
    case "unread":
      return {
        name,
        kind: "unread",
        title: taken.title,
        message: `${taken.problem.message}${placeOf(taken.problem)} The file is kept: look at its reading.`,
        href: `/projects/${project}/sweeps/${taken.sweepPublicId}/reading`,
      };
    case "twice":
      return {
        name,
        kind: "twice",
        title: taken.title,
        message: `This file is already here as “${taken.title}”. It was not stored again.`,
        href: `/projects/${project}/sweeps/${taken.sweepPublicId}`,
      };
    case "refused":
      return {
        name,
        kind: "refused",
        title: name,
        message: `${taken.problem.message}${placeOf(taken.problem)}`,
        href: null,
      };
  }
}

/** Where the trouble is, unless the words say it. */
function placeOf(problem: { message: string; line?: number; column?: number }): string {
  if (!problem.line || /^Line \d/.test(problem.message)) return "";
  return problem.column ? ` (line ${problem.line}, column ${problem.column})` : ` (line ${problem.line})`;
}

const MOST_FILES = 100;
