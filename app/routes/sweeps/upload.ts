import { type ProjectAccess, requireProject } from "~/auth/require.server";
import type { Route } from "./+types/upload";
import { readUploadForm, takeUploads } from "./take-uploads.server";

/**
 * One file of the drop zone; the page sends them one by one. Answered as JSON, or, to whoever accepts
 * `application/x-ndjson`, as one event a line: `{stage}` for each stage of a picture that is done, then `{results}`.
 */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const form = await readUploadForm(args.request);
  if (args.request.headers.get("Accept")?.includes(EVENTS)) return eventsOf(access, form);
  const results = await takeUploads(access, form);
  const refused = results.some((result) => result.kind === "refused");
  return Response.json({ results }, { status: refused ? 422 : 200 });
}

function eventsOf(access: ProjectAccess, form: FormData): Response {
  const encoder = new TextEncoder();
  let open = true;
  const body = new ReadableStream<Uint8Array>({
    async start(controller) {
      // Whoever closes the page stops hearing; the file is taken in all the same.
      const tell = (event: object) => {
        if (open) controller.enqueue(encoder.encode(`${JSON.stringify(event)}\n`));
      };
      const results = await takeUploads(access, form, (stage) => tell({ stage }));
      tell({ results });
      if (open) controller.close();
      open = false;
    },
    cancel() {
      open = false;
    },
  });
  // Not to be transformed: compression would hold the events back.
  return new Response(body, {
    headers: { "Content-Type": EVENTS, "Cache-Control": "no-store, no-transform" },
  });
}

const EVENTS = "application/x-ndjson";
