import { data } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as people from "~/db/people.server";
import { redirectWithMessage } from "~/services/flash.server";
import { beginGithub } from "~/services/github-sign-in.server";
import { parseForm } from "~/services/parse-form";
import { chooseAddress, removeWay } from "~/services/people.server";
import type { Route } from "./+types/ways";
import { AddWay, WayList } from "./components/WayList.tsx";
import { waysSchema } from "./ways.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "How you sign in · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const rows = await people.findIdentities(person.id);
  const email = person.email?.toLowerCase() ?? null;
  return {
    email: person.email,
    /** The address was confirmed by a provider; a code sent there signs the person in too. */
    alsoByMail: email !== null && !rows.some((row) => row.provider === "email" && row.subject === email),
    ways: rows.map((row) => ({
      provider: row.provider === "email" ? ("email" as const) : ("github" as const),
      subject: row.subject,
      since: row.createdAt.toISOString(),
      getsMails: row.provider === "email" && row.subject === email,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: waysSchema });
  if (submission.status !== "success") throw data("No such form. Nothing was changed.", 400);
  const value = submission.value;
  const here = "/settings/sign-in";
  switch (value.intent) {
    case "add-github":
      return beginGithub(here, person.id);
    case "remove": {
      const done = await removeWay(person.id, value.provider, value.subject);
      if (done === "last") return data({ problem: LAST }, { status: 409 });
      return redirectWithMessage(here, "That way to sign in was taken away.");
    }
    case "mails-to": {
      const done = await chooseAddress(person.id, value.subject);
      return redirectWithMessage(here, done ? `Mails go to ${value.subject} now.` : "Nothing was changed.");
    }
    default:
      return value satisfies never;
  }
}

const LAST =
  "This is your only way in, so it stays. Nothing was changed. Add another one first, then take this one away.";

export default function Ways({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[48rem] space-y-8">
      <div className="space-y-2">
        <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
        <h1>How you sign in</h1>
      </div>
      {actionData && "problem" in actionData && (
        <p role="alert" className="field-error">
          {actionData.problem}
        </p>
      )}
      <WayList {...loaderData} />
      <AddWay />
    </div>
  );
}
