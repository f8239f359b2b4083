import { requireProject } from "~/auth/require.server";
import { pollLive } from "~/services/live.server";
import type { Route } from "./+types/poll";

/** What happened since `?after=`, for pages whose stream does not get through. */
export async function loader(args: Route.LoaderArgs) {
  const { project, membership, lastEventId } = await requireProject(args, "project.read");
  const mark = new URL(args.request.url).searchParams.get("after");
  const answer = await pollLive(project.id, mark, { lastEventId, member: membership !== null });
  return Response.json(answer, { headers: { "Cache-Control": "no-store" } });
}
