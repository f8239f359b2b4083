import * as dips from "~/db/dips.server";
import * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import type { ReadProblem } from "~/readers/reading";
import { usableBenchId } from "~/services/bench-sweeps.server";
import { takeIn } from "~/services/intake.server";
import { requireApiProject } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readMultipart } from "./multipart.server.ts";
import { problem } from "./problem.ts";
import { shapeSweep, shapeSweepSummary } from "./shapes.server.ts";
import { uploadFieldsSchema } from "./upload.schema.ts";

const handle = endpoint({ GET: list, POST: takeOne });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.read");
  const page = await sweeps.findAllByProject(project.id, { cursor: call.query.get("cursor") ?? undefined });
  const found = await sweeps.findDipsOf(page.rows.map((row) => row.id));
  return Response.json({
    items: page.rows.map((row) =>
      shapeSweepSummary(
        row,
        found.filter((dip) => dip.sweepId === row.id),
        project.publicId,
      ),
    ),
    nextCursor: page.nextCursor,
  });
}

async function takeOne(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "sweep.add");
  const form = await readMultipart(call.request);
  const { file, ...fields } = Object.fromEntries(form);
  if (!(file instanceof File)) {
    throw invalid([{ field: "file", message: "Send the file in the field `file`." }]);
  }
  const parsed = uploadFieldsSchema.safeParse(fields);
  if (!parsed.success) throw invalid(parsed.error);
  const { title, takenAt, reading, bench, step } = parsed.data;
  const benchId = bench ? await usableBenchId(bench, project.id) : null;
  if (benchId === undefined) {
    throw invalid([{ field: "bench", message: "There is no such bench that can be used in this project." }]);
  }
  const after = step ? await requireDoneStep(step, project.id) : null;
  const taken = await takeIn({
    project,
    by: call.user,
    file: { name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) },
    title,
    takenAt: takenAt ? new Date(takenAt) : null,
    given: reading,
    benchId,
    keepUnread: false,
    also: after ? (sweep, tx) => steps.update(after.id, { afterSweepId: sweep.id }, tx) : undefined,
  });
  switch (taken.kind) {
    case "refused":
    case "unread":
      throw unreadable(taken.problem);
    case "twice": {
      const sweep = `/api/v1/sweeps/${taken.sweepPublicId}`;
      const detail = `This file is already in the project as “${taken.title}”. It was not stored again.`;
      throw problem({ status: 409, code: "twice", detail, sweep }, { Link: `<${sweep}>; rel="related"` });
    }
    case "read":
      return created(taken.sweepPublicId, project.publicId);
    default:
      return taken satisfies never;
  }
}

/** The step that the sweep comes after; a problem where there is none such. */
async function requireDoneStep(publicId: string, projectId: number): Promise<steps.StepRow> {
  const found = await steps.findByPublicId(publicId);
  if (found?.step.projectId !== projectId) {
    throw invalid([{ field: "step", message: "There is no such step in this project." }]);
  }
  if (found.step.state === "done") return found.step;
  throw invalid([{ field: "step", message: "This step is only planned: mark it as done first." }]);
}

async function created(sweepPublicId: string, projectPublicId: string): Promise<Response> {
  const found = await sweeps.findByPublicId(sweepPublicId);
  if (!found) throw new Error("The sweep that was just taken in is not there.");
  const its = await dips.findAllBySweep(found.sweep.id);
  const headers = { Location: `/api/v1/sweeps/${sweepPublicId}` };
  return Response.json(shapeSweep(found, its, projectPublicId), { status: 201, headers });
}

/** 413 too large, 415 no format that is read, 422 a format that is read with something wrong in it. */
function unreadable({ code, message, line, column }: ReadProblem): Response {
  const status = code === "too-large" || code === "too-many-points" ? 413 : NO_FORMAT.has(code) ? 415 : 422;
  return problem({ status, code, detail: `${message} Nothing was stored.`, line, column });
}

const NO_FORMAT = new Set(["not-a-format", "not-a-sweep", "picture"]);
