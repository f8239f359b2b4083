import * as batches from "~/db/batches.server";
import { newPublicId } from "~/db/ids.server";
import type { Project } from "~/db/projects.server";
import { receiveMore } from "~/routes/batch/batch-form.server";
import { beginBatch } from "~/services/batch/receive.server";
import type { BatchReport } from "~/services/batch/report";
import { requireApiProject } from "./access.server.ts";
import { againBatch } from "./batch-access.server.ts";
import { batchFieldsSchema } from "./batch-schemas.ts";
import { shapeBatch, shapeBatchSummary } from "./batch-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readMultipart } from "./multipart.server.ts";
import { problem } from "./problem.ts";

/** Many sweeps at once: checked here, taken in by another call. */
const handle = endpoint({ GET: list, POST: check });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "sweep.add");
  const rows = await batches.findAllByProject(project.id);
  const items = rows.map((row) =>
    shapeBatchSummary(row, row.phase as BatchReport["phase"], project.publicId),
  );
  return Response.json({ items });
}

async function check(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "sweep.add");
  const form = await readMultipart(call.request, { field: "files", limitBytes: MAX_BATCH_BODY_BYTES });
  const batch = requireFields(form);
  const run = batch ? await requireOpen(batch, project) : await begin(project, call.user);
  await receiveMore(run, form);
  const shaped = await shapeBatch(await againBatch(run), project);
  return Response.json(shaped, { status: 201, headers: { Location: shaped.links.self } });
}

/** Id of the batch that it is for; a problem where the form is none of a batch, so that nothing in it is passed over. */
function requireFields(form: FormData): string | undefined {
  const fields = [...form].filter(([name]) => !FILE_FIELDS.includes(name));
  const parsed = batchFieldsSchema.safeParse(Object.fromEntries(fields));
  if (!parsed.success) throw invalid(parsed.error);
  const files = FILE_FIELDS.flatMap((field) => form.getAll(field).map((value) => ({ field, value })));
  if (files.length === 0)
    throw invalid([{ field: "files", message: "Send sweeps or a ZIP of them in the field `files`." }]);
  const noFile = files.find(({ value }) => !(value instanceof File) || value.name === "");
  if (noFile) throw invalid([{ field: noFile.field, message: "Send a file, with its name." }]);
  if (form.getAll("table").length > 1) throw invalid([{ field: "table", message: "Send one table." }]);
  return parsed.data.batch;
}

async function begin(project: Project, by: { id: number }): Promise<batches.BatchRow> {
  const run = await beginBatch(newPublicId(), project, by);
  if (!run) throw new Error("The batch that was just begun is not there.");
  return run;
}

async function requireOpen(publicId: string, project: Project): Promise<batches.BatchRow> {
  const run = await batches.findByPublicId(publicId);
  if (run?.projectId !== project.id) {
    throw invalid([{ field: "batch", message: "There is no such batch in this project." }]);
  }
  const { phase } = run.report as BatchReport;
  if (phase !== "taking" && phase !== "done") return run;
  const detail = "This batch was taken in. Nothing was stored; begin another one.";
  throw problem({ status: 409, code: "taken", detail });
}

const FILE_FIELDS = ["files", "table"];
/** As the pages take: a ZIP of two files of the largest size. */
const MAX_BATCH_BODY_BYTES = 140 * 1024 * 1024;
