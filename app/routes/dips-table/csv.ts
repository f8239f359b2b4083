import { requireProject } from "~/auth/require.server";
import { dipsCsv } from "~/services/dips-table/table.server";
import { attachment } from "~/services/file-names";
import type { Route } from "./+types/csv";
import { parseTable } from "./dips-table.schema";

/** The table of all dips with the filters and the order of its page, all of its pages. */
export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.read");
  const { asked, order } = parseTable(new URL(args.request.url).searchParams);
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
