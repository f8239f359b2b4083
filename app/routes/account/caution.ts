import { data, redirect } from "react-router";
import { safePath } from "~/auth/next";
import { requirePerson } from "~/auth/require.server";
import { insertDismissal } from "~/db/people.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/caution";
import { cautionSchema } from "./account.schema.ts";

/** Puts a caution away for this person, for good. */
export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: cautionSchema });
  if (submission.status !== "success") throw data("No such caution. Nothing was changed.", 400);
  const { caution, returnTo } = submission.value;
  await insertDismissal(person.id, caution);
  if (new URL(args.request.url).pathname.endsWith(".data")) return data({ dismissed: caution });
  return redirect(safePath(returnTo, "/"));
}

export function loader() {
  return redirect("/");
}
