import { type AccessArgs, requireProject } from "~/auth/require.server";
import type * as projects from "~/db/projects.server";
import { notFound } from "~/errors";
import { etagOf, projectOfToken } from "~/services/feed.server";

/** A project's feed for feed readers: by session or openly where the project may be read so, else by a member's own key. */
export async function answerFeed(
  args: AccessArgs,
  draw: (project: projects.Project) => Promise<string>,
): Promise<Response> {
  const { request, params } = args;
  const token = new URL(request.url).searchParams.get("token");
  const project = token
    ? await projectOfToken(params.project ?? "", token)
    : (await requireProject(args, "project.read")).project;
  if (!project) throw notFound("feed");
  const text = await draw(project);
  const etag = etagOf(text);
  const headers = { ETag: etag, "Cache-Control": "private, no-cache", "X-Robots-Tag": "noindex" };
  if (request.headers.get("If-None-Match")?.includes(etag))
    return new Response(null, { status: 304, headers });
  return new Response(text, {
    headers: { ...headers, "Content-Type": "application/atom+xml; charset=utf-8" },
  });
}
