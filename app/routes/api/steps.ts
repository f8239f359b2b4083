import * as antennas from "~/db/antennas.server";
import * as steps from "~/db/steps.server";
import type { StepQuantity } from "~/measurement/antenna";
import { entryLabel } from "~/services/antenna-words";
import { expectedAfter } from "~/services/step-expectations.server";
import { FIELD_UNITS } from "~/services/step-quantities";
import { makeStep } from "~/services/steps.server";
import { type ApiProject, requireApiProject } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { newStepSchema } from "./story-schemas.ts";
import { shapeStep } from "./story-shapes.server.ts";

const handle = endpoint({ GET: list, POST: make });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.read");
  const [rows, ordered] = await Promise.all([
    steps.findAllByProject(project.id),
    steps.findSweepsInOrder(project.id),
  ]);
  return Response.json({ items: rows.map((row) => shapeStep(row, ordered, project.publicId)) });
}

async function make(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "step.edit");
  const parsed = newStepSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { title, body, state } = parsed.data;
  const at = parsed.data.at ? new Date(parsed.data.at) : null;
  const quantities = await withLabels(parsed.data.quantities, project, at);
  const values = { title, body, state, at, quantities };
  const expected = state === "planned" ? await expectedAfter(project.id, quantities, "metres") : undefined;
  const made = await makeStep({ projectId: project.id, by: call.user.id }, values, expected);
  if (made.kind === "problem") {
    const { index, message } = made.problem;
    throw invalid([{ field: `quantities.${index}.part`, message }]);
  }
  const [found, ordered] = await Promise.all([
    steps.findByPublicId(made.publicId),
    steps.findSweepsInOrder(project.id),
  ]);
  if (!found) throw new Error("The step that was just made is not there.");
  const headers = { Location: `/api/v1/steps/${made.publicId}` };
  return Response.json(shapeStep(found, ordered, project.publicId), { status: 201, headers });
}

type Sent = ReturnType<(typeof newStepSchema)["parse"]>["quantities"];

/** What points at the antenna is called what the antenna calls it. */
async function withLabels(
  sent: Sent,
  project: ApiProject["project"],
  at: Date | null,
): Promise<StepQuantity[]> {
  const antenna = (await antennas.findAt(project.id, at ?? new Date()))?.content;
  return sent.map(({ label = "", unit = "", from = null, to = null, part, field }) => {
    if (!part || !field) return { label, unit, from, to, target: null };
    const named = antenna ? entryLabel(`${part}.${field}`, antenna) : label || `${part}.${field}`;
    return { label: named, unit: FIELD_UNITS[field], from, to, target: { part, field } };
  });
}
