import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { EmptyState } from "~/components/ui/EmptyState";
import * as sentMentions from "~/db/sent-mentions.server";
import * as webmentions from "~/db/webmentions.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { decide } from "~/services/webmention/moderate.server";
import type { Route } from "./+types/mentions";
import { MentionList } from "./components/MentionList.tsx";
import { Told } from "./components/Told.tsx";
import { shapeMention } from "./shape-mention.ts";
import { decisionSchema } from "./webmention.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Cited elsewhere · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "mention.moderate");
  const [waiting, shown, rest, told] = await Promise.all([
    webmentions.findAllByProject(project.id, ["verified"], A_LIST),
    webmentions.findAllByProject(project.id, ["shown"], A_LIST),
    webmentions.findAllByProject(project.id, ["hidden", "gone", "refused", "queued"], A_LIST),
    sentMentions.findAllByProject(project.id, A_LIST),
  ]);
  return {
    waiting: waiting.map(shapeMention),
    shown: shown.map(shapeMention),
    rest: rest.map(shapeMention),
    told: told.map(({ sent, writeUp }) => ({
      key: sent.id,
      target: sent.target,
      state: sent.state,
      reason: sent.reason,
      at: sent.at,
      writeUp,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "mention.moderate");
  const parsed = decisionSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That form was not understood. Nothing was changed.", 400);
  const { intent, mention } = parsed.data;
  if (!(await decide(mention, intent, project, person))) throw notFound("mention that this can be done with");
  return redirectWithMessage(`/projects/${project.publicId}/mentions`, DONE[intent]);
}

export default function ProjectMentions({ loaderData }: Route.ComponentProps) {
  const { waiting, shown, rest, told } = loaderData;
  const none = waiting.length + shown.length + rest.length === 0;
  return (
    <div className="grid gap-8 max-w-[56rem]">
      <header className="grid gap-2">
        <h2 className="sweep-title">Cited elsewhere</h2>
        <p className="soft max-w-[72ch]">
          Pages of other sites that say they link to a plate or a write-up of this project. Each is looked up
          first; what it says is its author's. Readers see those that you show.
        </p>
      </header>
      {none && (
        <EmptyState drawing="plates" title="Nobody said so yet">
          Plates and published write-ups take Webmentions at /webmention; what comes waits here for you.
        </EmptyState>
      )}
      <MentionList id="waiting" title="Waiting for you" mentions={waiting} />
      <MentionList id="shown" title="Shown to readers" mentions={shown} />
      <MentionList id="rest" title="Not shown" mentions={rest} />
      <Told told={told} />
    </div>
  );
}

const DONE = {
  show: "Readers see it now.",
  hide: "Readers do not see it.",
  check: "It is looked up again; reload in a while.",
};
const A_LIST = 100;
