import { redirect } from "react-router";
import { finishGithub, forgetGithub } from "~/auth/github.server";
import { startSession } from "~/auth/session.server";
import { findOrCreateByIdentity } from "~/services/people.server";
import type { Route } from "./+types/github-callback";
import type { SignInProblemId } from "./sign-in-problems.ts";

/** Where the provider sends the browser back to. */
export async function loader({ request }: Route.LoaderArgs) {
  const headers = new Headers({ "Cache-Control": "no-store" });
  await forgetGithub(headers);
  const answer = await finishGithub(request);
  const refuse = (problem: SignInProblemId) =>
    redirect(`/sign-in?${new URLSearchParams({ problem, next: answer.next })}`, { headers });
  if (!answer.ok) return refuse(answer.problem);
  const user = await findOrCreateByIdentity({ provider: "github", ...answer.profile });
  if (user.suspendedAt) return refuse("suspended");
  headers.append("Set-Cookie", await startSession(request, user.id));
  return redirect(answer.next, { headers });
}
