import { data } from "react-router";
import { safePath } from "~/auth/next";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as blocks from "~/db/blocks.server";
import * as people from "~/db/people.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/blocked";
import { blockedSchema } from "./blocked.schema.ts";
import { BlockedList, BlockForm } from "./components/BlockedList.tsx";

export const meta: Route.MetaFunction = () => [{ title: "People you blocked · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const rows = await blocks.findAllByBlocker(person.id);
  return {
    blocked: rows.map(({ userName, name, at }) => ({ userName, name, at: at.toISOString() })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: blockedSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const { value } = submission;
  const wrong = (text: string) =>
    data({ lastResult: submission.reply({ fieldErrors: { userName: [text] } }) }, { status: 400 });
  const other = await people.findByUserName(value.userName);
  if (!other) return wrong(`Nobody here is called ${value.userName}. Nothing was changed.`);
  if (other.id === person.id) return wrong("That is you. Nothing was changed.");
  switch (value.intent) {
    case "block":
      await blocks.insert(person.id, other.id);
      return redirectWithMessage(
        safePath(value.returnTo, "/settings/blocked"),
        `${other.name} is blocked for you.`,
      );
    case "unblock":
      await blocks.deleteOne(person.id, other.id);
      return redirectWithMessage("/settings/blocked", `${other.name} is not blocked any more.`);
    default:
      return value satisfies never;
  }
}

export default function Blocked({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[48rem] space-y-8">
      <div className="space-y-2">
        <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
        <h1>People you blocked</h1>
      </div>
      <p className="soft max-w-[72ch]">
        Their notes are folded away for you, and they can't mention, add or invite you. They are not told, and
        still read what their role lets them read.
      </p>
      <BlockedList blocked={loaderData.blocked} />
      <BlockForm lastResult={actionData?.lastResult} />
    </div>
  );
}
