import { data, redirect } from "react-router";
import { safePath } from "~/auth/next";
import { findPerson } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { env } from "~/env.server";
import type { Route } from "./+types/sign-in";
import { EmailAskForm } from "./components/EmailAskForm.tsx";
import { isSignInProblem, SIGN_IN_PROBLEMS } from "./sign-in-problems.ts";

export const meta: Route.MetaFunction = () => [{ title: "Sign in · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const query = new URL(args.request.url).searchParams;
  const next = safePath(query.get("next"));
  const asked = query.get("problem");
  const problem = isSignInProblem(asked) ? asked : null;
  if (!problem && (await findPerson(args))) throw redirect(next);
  return data(
    { next, problem, standIn: env.LOCAL_GITHUB },
    problem ? { status: SIGN_IN_PROBLEMS[problem].status } : {},
  );
}

export default function SignIn({ loaderData }: Route.ComponentProps) {
  const { next, problem, standIn } = loaderData;
  return (
    <div className="mx-auto max-w-[34rem] space-y-6 pt-4">
      <h1>Sign in</h1>
      {problem && (
        <section role="alert" className="panel space-y-1 border-l-3 border-l-alarm">
          <h2 className="text-base">{SIGN_IN_PROBLEMS[problem].title}</h2>
          <p>{SIGN_IN_PROBLEMS[problem].text}</p>
        </section>
      )}
      <p className="soft">
        Reading public projects needs no account. Sign in to take sweeps in, to write notes, and to read what
        was shared with you.
      </p>
      <form method="get" action="/auth/github">
        <input type="hidden" name="next" value={next} />
        <Button icon="person">{standIn ? "Sign in with the local stand-in" : "Sign in with GitHub"}</Button>
      </form>
      <section className="space-y-3 border-t border-rule pt-6">
        <h2 className="text-base">Or by e-mail</h2>
        <EmailAskForm next={next} />
      </section>
      {standIn && (
        <p className="soft text-small">
          This installation has no connection to GitHub. Its button leads to a stand-in on this machine, where
          you choose one of a few invented people. No password is asked for, and anyone who can reach this
          machine can do the same.
        </p>
      )}
    </div>
  );
}
