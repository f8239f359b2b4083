import type * as projects from "~/db/projects.server";
import { dipsCsv } from "~/services/dips-table/table.server";
import { attachment } from "~/services/file-names";
import type { AskedTable } from "./dips-table.schema.ts";

/** All pages of the table as one CSV, sent while it is fetched. */
export async function answerCsv(
  project: Pick<projects.Project, "id" | "title" | "ituRegion">,
  { asked, order }: Pick<AskedTable, "asked" | "order">,
): Promise<Response> {
  const pieces = dipsCsv(project, asked, order);
  const encoder = new TextEncoder();
  // What goes wrong with the query is answered as an error, not as half a file.
  const first = await pieces.next();
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      if (!first.done) controller.enqueue(encoder.encode(first.value));
    },
    async pull(controller) {
      const { value, done } = await pieces.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
    async cancel() {
      await pieces.return(undefined);
    },
  });
  return new Response(body, {
    headers: {
      "Content-Type": "text/csv; charset=utf-8",
      "Content-Disposition": attachment(`${project.title}, dips.csv`),
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, no-cache",
    },
  });
}
