import { redirect } from "react-router";
import { findPerson } from "~/auth/require.server";
import { startSession } from "~/auth/session.server";
import { redirectWithMessage } from "~/services/flash.server";
import { finishGithub, forgetGithub } from "~/services/github-sign-in.server";
import { addWay, findOrCreateByIdentity } from "~/services/people.server";
import type { Route } from "./+types/github-callback";
import type { SignInProblemId } from "./sign-in-problems.ts";

/** Where the provider sends the browser back to. */
export async function loader(args: Route.LoaderArgs) {
  const { request } = args;
  const headers = new Headers({ "Cache-Control": "no-store" });
  await forgetGithub(headers);
  const answer = await finishGithub(request);
  const refuse = (problem: SignInProblemId) =>
    redirect(`/sign-in?${new URLSearchParams({ problem, next: answer.next })}`, { headers });
  if (!answer.ok) return refuse(answer.problem);
  if (answer.addTo !== null) {
    const person = await findPerson(args);
    if (person?.id !== answer.addTo) return refuse("state");
    const done = await addWay(person.id, { provider: "github", ...answer.profile });
    const message = done === "added" ? "GitHub signs you in from now on." : TAKEN;
    return redirectWithMessage("/settings/sign-in", message, { headers });
  }
  const user = await findOrCreateByIdentity({ provider: "github", ...answer.profile });
  if (user.suspendedAt) return refuse("suspended");
  headers.append("Set-Cookie", await startSession(request, user.id));
  return redirect(answer.next, { headers });
}

const TAKEN =
  "That GitHub account signs somebody else in here, maybe another account of yours. Nothing was changed.";
