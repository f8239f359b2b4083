import { beginTaking, giveUp, leaveOutProblems } from "~/services/batch/mend.server";
import type { BatchReport } from "~/services/batch/report";
import { startOnBatch } from "~/services/batch/work.server";
import { againBatch, requireApiBatch } from "./batch-access.server.ts";
import { takeBatchSchema } from "./batch-schemas.ts";
import { shapeBatch } from "./batch-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJsonIfAny } from "./multipart.server.ts";
import { problem } from "./problem.ts";

/** One batch: what was found, the word that takes it in, and its end. */
const handle = endpoint({ GET: read, POST: takeIn, DELETE: remove });

export const loader = handle;
export const action = handle;

async function read(call: Call): Promise<Response> {
  const { run, project } = await requireApiBatch(call);
  return Response.json(await shapeBatch(run, project));
}

/** Sent again it goes on; rows that failed are tried again. */
async function takeIn(call: Call): Promise<Response> {
  const { run, project } = await requireApiBatch(call);
  const parsed = takeBatchSchema.safeParse(await readJsonIfAny(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { phase, table } = run.report as BatchReport;
  if (phase === "receiving" || phase === "checking") throw notReady(STILL[phase]);
  if (phase === "checked" && parsed.data.problems === "refuse" && table?.problem) {
    throw notReady(`The table could not be used: ${table.problem}`);
  }
  if (parsed.data.problems === "leave-out") await leaveOutProblems(run.publicId, project.id);
  if (!(await beginTaking(run.publicId, project.id))) throw notReady(STUCK);
  await startOnBatch(run.publicId);
  const shaped = await shapeBatch(await againBatch(run), project);
  return Response.json(shaped, { status: 202, headers: { Location: shaped.links.self } });
}

async function remove(call: Call): Promise<Response> {
  const { run } = await requireApiBatch(call);
  if (await giveUp(run.publicId)) return new Response(null, { status: 204 });
  const detail = "It is being taken in just now. Nothing was removed; wait until it is done.";
  throw problem({ status: 409, code: "under-way", detail });
}

function notReady(why: string): Response {
  return problem({ status: 409, code: "not-ready", detail: `${why} Nothing was taken in.` });
}

const STILL = {
  receiving: "No file of it came yet: send some for this batch.",
  checking: "It is still being checked: ask for it until its phase is `checked`.",
};
const STUCK = "Something stands in the way of some rows, or none is left: look at `problems` of each row.";
