import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import * as invitations from "~/db/invitations.server";
import { env } from "~/env.server";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { invite } from "~/services/invitations.server";
import { handOver } from "~/services/ownership.server";
import { parseForm } from "~/services/parse-form";
import { addMember, changeRole, type MemberChange, removeMember } from "~/services/projects.server";
import type { Route } from "./+types/members";
import { AddMemberForm } from "./components/AddMemberForm.tsx";
import { HandOverForm } from "./components/HandOverForm.tsx";
import { InvitationList } from "./components/InvitationList.tsx";
import { InviteForm } from "./components/InviteForm.tsx";
import { MemberList } from "./components/MemberList.tsx";
import { membersSchema } from "./members.schema.ts";
import { membersPage } from "./members-page.server.ts";

export const meta: Route.MetaFunction = () => [{ title: "Members · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  return membersPage(access);
}

export async function action(args: Route.ActionArgs) {
  const { project, person, membership, may } = await requireProject(args, "project.read");
  const submission = parseForm(await args.request.formData(), { schema: membersSchema });
  // Leaving is everybody's own; all else is for owners, whatever the form holds.
  if (!person || (submission.payload.intent !== "leave" && !may("members.manage")))
    throw refused(OWNERS_ONLY);
  if (submission.status !== "success") return data({ ...NOTHING, lastResult: submission.reply() }, 400);
  const value = submission.value;
  const here = `/projects/${project.publicId}/members`;
  const wrong = (field: string, text: string, status = 400) =>
    data({ ...NOTHING, lastResult: submission.reply({ fieldErrors: { [field]: [text] } }) }, status);
  switch (value.intent) {
    case "add": {
      const done = await addMember(project.id, value.userName, value.role, person.id);
      if (done === "added") return redirectWithMessage(here, `${value.userName} was added as ${value.role}.`);
      if (done === "already") return redirectWithMessage(here, `${value.userName} is a member already.`);
      return wrong("userName", done === "unwilling" ? unwilling(value.userName) : unknown(value.userName));
    }
    case "invite": {
      const { email = null, role, days } = value;
      const made = await invite({ project, by: person, email, role, days });
      if (made.kind === "wait") return wrong("email", TOO_MANY, 429);
      if (email) return redirectWithMessage(here, `An invitation is on its way to ${email}.`);
      const link = `${env.BASE_URL}${made.path}`;
      // The only answer that ever holds the link: no cache may keep it.
      const headers = { "Cache-Control": "no-store" };
      return data({ ...NOTHING, lastResult: submission.reply({ resetForm: true }), link }, { headers });
    }
    case "revoke":
      await invitations.revoke(project.id, value.invitation);
      return redirectWithMessage(here, "The invitation opens nothing any more. Who came by it stays.");
    case "change": {
      const done = await changeRole(project.id, value.userName, value.role, person.id);
      return answer(done, here, `${value.userName} is ${value.role} now.`);
    }
    case "remove": {
      const done = await removeMember(project.id, value.userName, person.id);
      return answer(done, here, `${value.userName} is not a member any more. Notes and sweeps stay.`);
    }
    case "hand-over": {
      if (value.title !== project.title) return wrong("title", "That is not the title. Nothing was changed.");
      const afterwards = value.afterwards === "leave" ? null : value.afterwards;
      const done = await handOver({ project, from: person, toUserName: value.userName, afterwards });
      if (done !== "done")
        return wrong("userName", `${value.userName} is no other member. Nothing was changed.`);
      return redirectWithMessage(afterwards ? here : "/projects", `${value.userName} is owner now.`);
    }
    case "leave": {
      if (!membership) throw refused("You are not a member of this project. Nothing was changed.");
      const done = await removeMember(project.id, person.userName, person.id);
      return answer(
        done,
        done === "done" ? "/projects" : here,
        "You left the project. What you wrote stays.",
      );
    }
    default:
      return value satisfies never;
  }
}

export function headers({ actionHeaders }: Route.HeadersArgs) {
  return actionHeaders;
}

/** Asked twice, a change is already as it was wished: only the last owner's going is refused. */
function answer(done: MemberChange, to: string, message: string) {
  if (done === "last-owner") return data({ ...NOTHING, problem: LAST_OWNER }, 409);
  return redirectWithMessage(
    to,
    done === "done" ? message : "That person is not a member. Nothing was changed.",
  );
}

function unknown(userName: string): string {
  return `Nobody here is called ${userName}. Nobody was added. Somebody new can be invited below.`;
}

function unwilling(userName: string): string {
  return `${userName} can't be added by you. Nobody was added. Another owner may, or send the link of an invitation.`;
}

const NOTHING = { lastResult: null, problem: null, link: null };
const OWNERS_ONLY = "Only owners add members, remove them or change their roles. Nothing was changed.";
const LAST_OWNER =
  "A project needs an owner, and this is its last one. Nothing was changed. Make somebody else owner first, or delete the project.";
const TOO_MANY =
  "You made many invitations today. None was made now. One link serves many people; or wait until tomorrow.";

export default function Members({ loaderData, actionData }: Route.ComponentProps) {
  const { mayManage, members, title } = loaderData;
  const last = actionData?.lastResult;
  const lastOf = (intent: string) => (last?.initialValue?.intent === intent ? last : undefined);
  return (
    <div className="max-w-[60rem] space-y-10">
      <section className="space-y-3">
        <h2 className="sweep-title">Members</h2>
        {actionData?.problem && (
          <p role="alert" className="field-error">
            {actionData.problem}
          </p>
        )}
        <MemberList {...loaderData} />
      </section>
      {mayManage && (
        <>
          <InviteForm
            key={loaderData.invitations[0]?.id}
            lastResult={lastOf("invite")}
            link={actionData?.link ?? null}
          />
          <InvitationList invitations={loaderData.invitations} />
          <AddMemberForm lastResult={lastOf("add")} />
          <HandOverForm
            title={title}
            members={members.filter((member) => !member.self)}
            lastResult={lastOf("hand-over")}
          />
        </>
      )}
    </div>
  );
}
