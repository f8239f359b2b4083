import { parseWithZod } from "@conform-to/zod/v4";
import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import * as projects from "~/db/projects.server";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { addMember, changeRole, type MemberChange, removeMember } from "~/services/projects.server";
import type { Route } from "./+types/members";
import { AddMemberForm } from "./components/AddMemberForm.tsx";
import { MemberList } from "./components/MemberList.tsx";
import { membersSchema } from "./project.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Members · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may, person, membership } = await requireProject(args, "project.read");
  const rows = await projects.findMembers(project.id);
  const ownerCount = rows.filter((row) => row.role === "owner").length;
  return {
    mayManage: may("members.manage"),
    isMember: membership !== null,
    members: rows.map((row) => ({
      userName: row.userName,
      name: row.name,
      role: row.role,
      since: row.since.toISOString(),
      self: row.userId === person?.id,
      lastOwner: row.role === "owner" && ownerCount === 1,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person, membership, may } = await requireProject(args, "project.read");
  const submission = parseWithZod(await args.request.formData(), { schema: membersSchema });
  // Leaving is everybody's own; all else is for owners, whatever the form holds.
  if (submission.payload.intent !== "leave" && !may("members.manage")) throw refused(OWNERS_ONLY);
  if (submission.status !== "success")
    return data({ lastResult: submission.reply(), problem: null }, { status: 400 });
  const value = submission.value;
  const here = `/projects/${project.publicId}/members`;
  switch (value.intent) {
    case "add": {
      const done = await addMember(project.id, value.userName, value.role, person?.id);
      if (done === "added") return redirectWithMessage(here, `${value.userName} was added as ${value.role}.`);
      if (done === "already") return redirectWithMessage(here, `${value.userName} is a member already.`);
      const fieldErrors = { userName: [`Nobody here is called ${value.userName}. Nobody was added.`] };
      return data({ lastResult: submission.reply({ fieldErrors }), problem: null }, { status: 400 });
    }
    case "change": {
      const done = await changeRole(project.id, value.userName, value.role, person?.id);
      return answer(done, here, `${value.userName} is ${value.role} now.`);
    }
    case "remove": {
      const done = await removeMember(project.id, value.userName, person?.id);
      return answer(done, here, `${value.userName} is not a member any more. Notes and sweeps stay.`);
    }
    case "leave": {
      if (!person || !membership) throw refused("You are not a member of this project. Nothing was changed.");
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

/** Asked twice, a change is already as it was wished: only the last owner's going is refused. */
function answer(done: MemberChange, to: string, message: string) {
  if (done === "last-owner") return data({ lastResult: null, problem: LAST_OWNER }, { status: 409 });
  return redirectWithMessage(
    to,
    done === "done" ? message : "That person is not a member. Nothing was changed.",
  );
}

const OWNERS_ONLY = "Only owners add members, remove them or change their roles. Nothing was changed.";
const LAST_OWNER =
  "A project needs an owner, and this is its last one. Nothing was changed. Make somebody else owner first, or delete the project.";

export default function Members({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[60rem] space-y-8">
      <h2>Members</h2>
      {actionData?.problem && (
        <p role="alert" className="field-error">
          {actionData.problem}
        </p>
      )}
      <MemberList {...loaderData} />
      {loaderData.mayManage && <AddMemberForm lastResult={actionData?.lastResult} />}
    </div>
  );
}
