import * as plates from "~/db/plates.server";
import { plateChoices } from "~/services/plates/choices";
import { propose } from "~/services/plates/compose.server";
import { makePlate } from "~/services/plates/make.server";
import { parseRecord } from "~/services/plates/record";
import { subjectOf } from "~/services/plates/subject";
import { requireApiProject } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { newPlateSchema } from "./plate-schemas.ts";
import { shapePlate, shapePlateSummary } from "./plate-shapes.server.ts";

const handle = endpoint({ GET: list, POST: make });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.read");
  const rows = await plates.findAllByProject(project.id);
  return Response.json({ items: rows.map(shapePlateSummary) });
}

async function make(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "plate.make");
  const parsed = newPlateSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { from, mends, wrong, clientKey, ...wanted } = parsed.data;
  const subject = subjectOf(from);
  if (!subject) throw invalid([{ field: "from", message: "Not one of the kinds that a plate can be of." }]);
  const mended = mends ? await requireMended(project.id, mends) : null;
  if (mended && !wrong) {
    throw invalid([{ field: "wrong", message: "Say what was wrong with the version before." }]);
  }
  const proposed = mended ? parseRecord(mended.record).choices : await propose(project, subject);
  if ("problem" in proposed) throw invalid([{ field: "from", message: proposed.problem }]);
  const choices = plateChoices.safeParse({ ...proposed, ...wanted });
  if (!choices.success) throw invalid(choices.error);
  const made = await makePlate({
    project,
    subject,
    choices: choices.data,
    by: call.user,
    draw: clientKey ?? null,
    mends: mended && wrong ? { plate: mended, reason: wrong } : null,
  });
  if ("problem" in made) throw invalid([{ field: "from", message: made.problem }]);
  const found = await plates.findByPublicId(made.publicId);
  if (!found) throw new Error("The plate that was just made is not there.");
  const headers = { Location: `/api/v1/plates/${made.publicId}` };
  return Response.json(await shapePlate(found), { status: 201, headers });
}

async function requireMended(projectId: number, publicId: string): Promise<plates.PlateRow> {
  const found = await plates.findByPublicId(publicId);
  if (found?.projectId !== projectId) {
    throw invalid([{ field: "mends", message: "There is no such plate in this project." }]);
  }
  const newest = (await plates.findVersions(found)).at(-1);
  if (newest && newest.publicId !== publicId) {
    const message = `This is not the newest version: mend ${newest.publicId} instead.`;
    throw invalid([{ field: "mends", message }]);
  }
  return found;
}
