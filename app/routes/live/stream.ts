import { redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { unavailable } from "~/errors";
import { readMark } from "~/services/live-marks.server";
import { openStream, STREAM_HEADERS } from "~/services/live-stream.server";
import type { Route } from "./+types/stream";

/** What happens in the project, as it happens. Goes on after `Last-Event-ID`, else after `?after=`, else from now. */
export async function loader(args: Route.LoaderArgs) {
  const { request } = args;
  const { project, person, lastEventId } = await requireProject(args, "project.read");
  const url = new URL(request.url);
  if (!request.headers.get("Accept")?.includes("text/event-stream")) {
    throw redirect(`/projects/${project.publicId}/live.json${url.search}`);
  }
  if (request.method === "HEAD") return new Response(null, { headers: STREAM_HEADERS });
  const mark = request.headers.get("Last-Event-ID") || url.searchParams.get("after");
  const after = mark ? readMark(project.id, mark) : lastEventId;
  const ear = { projectId: project.id, sessionId: person?.sessionId ?? null };
  const stream = await openStream(ear, after, request.signal);
  if (!stream) throw unavailable("Too many pages are open", "Pages ask every few seconds instead.");
  return stream;
}
