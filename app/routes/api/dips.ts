import type { z } from "zod";
import { answerCsv } from "~/routes/dips-table/answer-csv.server";
import { parseTable } from "~/routes/dips-table/dips-table.schema";
import { bandChoices } from "~/services/dips-table/bands";
import { decodePlace, encodePlace } from "~/services/dips-table/place";
import { bandsOf, dipsBehind, type ListedDip } from "~/services/dips-table/table.server";
import { requireApiProject } from "./access.server.ts";
import { dipsQuerySchema, type dipTableShape, type tableDipShape } from "./dips-schemas.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { shapeDip } from "./shapes.server.ts";

const handle = endpoint({ GET: list });

export const loader = handle;
export const action = handle;

/** All dips of a project, with the filters of their page; all at once as CSV for who asks for that. */
async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.read");
  const parsed = dipsQuerySchema.safeParse(Object.fromEntries(call.query));
  if (!parsed.success) throw invalid(parsed.error);
  const { cursor } = parsed.data;
  const place = cursor === undefined ? null : decodePlace(cursor);
  if (cursor !== undefined && !place) {
    throw invalid([{ field: "cursor", message: "Not a `nextCursor` of this list." }]);
  }
  const { asked, order, errors } = parseTable(call.query);
  const [wrong] = Object.keys(errors);
  if (wrong) throw invalid([{ field: wrong, message: "Less than 1,000,000." }]);
  const bandNames = bandChoices(await bandsOf(project)).map(({ value }) => value);
  if (!bandNames.includes(asked.band)) {
    const message = `Known in this project: ${bandNames.filter((name) => name !== "").join(", ")}.`;
    throw invalid([{ field: "band", message }]);
  }
  if (wantsCsv(call.request)) return answerCsv(project, { asked, order });
  const { all, rows, next } = await dipsBehind(project, asked, order, place);
  const answer: z.output<typeof dipTableShape> = {
    total: all,
    items: rows.map((row) => shapeTableDip(row, project.publicId)),
    nextCursor: next && encodePlace(next),
  };
  return Response.json(answer, { headers: { Vary: "Accept" } });
}

function shapeTableDip(row: ListedDip, project: string): z.output<typeof tableDipShape> {
  const { sweepPublicId, sweepTitle, takenAt, createdAt, trailPublicId, trailName, band } = row;
  return {
    ...shapeDip({ dip: row, noteCount: row.noteCount }, project),
    sweep: {
      id: sweepPublicId,
      title: sweepTitle,
      takenAt: takenAt?.toISOString() ?? null,
      createdAt: createdAt.toISOString(),
    },
    band: band.name,
    inDesignBand: band.design,
    trail: trailPublicId === null ? null : { id: trailPublicId, name: trailName ?? "" },
  };
}

/** JSON for whoever takes both, or says nothing. */
function wantsCsv(request: Request): boolean {
  const accept = request.headers.get("Accept") ?? "";
  return /\btext\/csv\b/i.test(accept) && !/\bapplication\/json\b/i.test(accept);
}
