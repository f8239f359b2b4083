import { data, Form, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { EmptyState } from "~/components/ui/EmptyState";
import * as feedTokens from "~/db/feed-tokens.server";
import { env } from "~/env.server";
import { refused } from "~/errors";
import { accountOf, putAway } from "~/services/activity.server";
import { makeFeedToken } from "~/services/feed.server";
import { redirectWithMessage } from "~/services/flash.server";
import type { Route } from "./+types/activity";
import { activitySchema } from "./activity.schema.ts";
import { Days } from "./components/Days.tsx";
import { Feeds } from "./components/Feeds.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Activity · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person, membership } = await requireProject(args, "project.read");
  const search = new URL(args.request.url).searchParams;
  const since = search.get("since") ?? undefined;
  const [account, feeds] = await Promise.all([
    accountOf(project, { cursor: search.get("cursor") ?? undefined, since }),
    person && membership ? feedTokens.findAllByUser(person.id, project.id) : [],
  ]);
  return {
    ...account,
    since: since ?? null,
    project: { publicId: project.publicId, isPrivate: project.visibility === "private" },
    address: `${env.BASE_URL}/projects/${project.publicId}/activity.atom`,
    member: membership !== null,
    feeds,
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person, membership } = await requireProject(args, "project.read");
  if (!person || !membership) throw refused("This is for members of the project. Nothing was changed.");
  const parsed = activitySchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That form was not understood. Nothing was changed.", 400);
  const value = parsed.data;
  const here = `/projects/${project.publicId}`;
  switch (value.intent) {
    case "seen":
      await putAway(project, person.id, value.mark);
      return redirectWithMessage(here, "What happened so far is put away.");
    case "make-feed": {
      const token = await makeFeedToken(person.id, project.id);
      // The only answer that ever holds the key: no cache may keep it.
      return data({ token }, { headers: { "Cache-Control": "no-store" } });
    }
    case "revoke-feed":
      await feedTokens.revoke(person.id, value.feed);
      return redirectWithMessage(`${here}/activity`, "That feed address opens nothing any more.");
    default:
      return value satisfies never;
  }
}

export default function Activity({ loaderData, actionData }: Route.ComponentProps) {
  const { days, nextCursor, since, mark, member } = loaderData;
  const made =
    actionData && typeof actionData === "object" && "token" in actionData ? actionData.token : null;
  return (
    <div className="project-page">
      <section aria-labelledby="activity" className="grid gap-5 content-start min-w-0">
        <h2 id="activity" className="sweep-title">
          {since ? "Since you were last here" : "What happened"}
        </h2>
        {since && (
          <div className="flex flex-wrap items-center gap-4">
            {member && mark && (
              <Form method="post">
                <input type="hidden" name="mark" value={mark} />
                <button type="submit" name="intent" value="seen" className="button button-quiet">
                  I have seen this
                </button>
              </Form>
            )}
            <Link to="?">Everything</Link>
          </div>
        )}
        {days.length === 0 ? (
          <EmptyState drawing="notes" title={since ? "Nothing new" : "Nothing happened yet"}>
            Sweeps, steps, notes and verdicts are told here, day by day.
          </EmptyState>
        ) : (
          <Days days={days} />
        )}
        {nextCursor && (
          <p>
            <Link to={`?${new URLSearchParams({ ...(since ? { since } : {}), cursor: nextCursor })}`}>
              Earlier
            </Link>
          </p>
        )}
      </section>
      <Feeds data={loaderData} made={made} />
    </div>
  );
}
