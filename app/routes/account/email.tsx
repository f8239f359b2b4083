import { data, redirect } from "react-router";
import { forgetAsk, keepAsk, readAsk } from "~/auth/email-ask.server";
import { safePath } from "~/auth/next";
import { findPerson, requirePerson } from "~/auth/require.server";
import { startSession } from "~/auth/session.server";
import { clientAddressContext } from "~/context";
import type { User } from "~/db/people.server";
import { env } from "~/env.server";
import { askForCode, findAsk, makeNewcomer, tryCode } from "~/services/email-sign-in.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/email";
import { EmailAskForm } from "./components/EmailAskForm.tsx";
import { EmailCodeForm } from "./components/EmailCodeForm.tsx";
import { NewcomerForm } from "./components/NewcomerForm.tsx";
import { emailSchema } from "./email.schema.ts";
import type { SignInProblemId } from "./sign-in-problems.ts";

export const meta: Route.MetaFunction = () => [{ title: "Sign in by e-mail · Swale" }];

/** Asks for the address, then for the code, then, where the address is new here, for a name. */
export async function loader(args: Route.LoaderArgs) {
  const query = new URL(args.request.url).searchParams;
  const kept = await readAsk(args.request);
  const ask = kept && (await findAsk(kept.token));
  const adding = ask ? ask.forUserId !== null : query.get("add") === "yes";
  if (adding) await requirePerson(args);
  const next = safePath(query.get("next"));
  if (!adding && !ask && (await findPerson(args))) throw redirect(next);
  const inbox = env.LOCAL_INBOX_URL ?? null;
  return { stage: ask?.stage ?? ("ask" as const), email: ask?.email ?? null, adding, next, inbox };
}

export async function action(args: Route.ActionArgs) {
  const { request } = args;
  const submission = parseForm(await request.formData(), { schema: emailSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const value = submission.value;
  const refuse = (field: string, text: string, status: number) =>
    data({ lastResult: submission.reply({ fieldErrors: { [field]: [text] } }) }, { status });
  const kept = await readAsk(request);
  switch (value.intent) {
    case "ask": {
      const person = value.add ? await requirePerson(args) : null;
      const address = args.context.get(clientAddressContext);
      const asked = await askForCode({ email: value.email, forUserId: person?.id ?? null, address });
      if (asked.kind === "wait") return refuse("email", tooMany(asked.seconds), 429);
      const next = person ? "/settings/sign-in" : safePath(value.next);
      return redirect("/auth/email", { headers: { "Set-Cookie": await keepAsk({ ...asked, next }) } });
    }
    case "code": {
      const person = await findPerson(args);
      const tried = kept ? await tryCode(kept.token, value.code, person?.id ?? null) : OVER;
      switch (tried.kind) {
        case "wrong":
          return refuse("code", `That is not the code. ${triesLeft(tried.left)}`, 400);
        case "over":
          return over(kept?.next);
        case "newcomer":
          return redirect("/auth/email");
        case "taken":
          return leave("/settings/sign-in", TAKEN);
        case "added":
          return leave("/settings/sign-in", `${tried.email} signs you in from now on.`);
        case "signed-in":
          return enter(request, tried.user, kept?.next);
        default:
          return tried satisfies never;
      }
    }
    case "name": {
      const user = kept && (await makeNewcomer(kept.token, value.name));
      if (!user) return over(kept?.next);
      return enter(request, user, kept.next);
    }
    case "again":
      return redirect(`/auth/email?${new URLSearchParams({ next: kept?.next ?? "" })}`, {
        headers: { "Set-Cookie": await forgetAsk() },
      });
    default:
      return value satisfies never;
  }
}

async function enter(request: Request, user: User, next: string | undefined) {
  const headers = new Headers({ "Cache-Control": "no-store" });
  headers.append("Set-Cookie", await forgetAsk());
  if (user.suspendedAt) return redirect("/sign-in?problem=suspended", { headers });
  headers.append("Set-Cookie", await startSession(request, user.id));
  return redirect(safePath(next), { headers });
}

async function over(next: string | undefined) {
  const problem: SignInProblemId = "email-over";
  const query = new URLSearchParams({ problem, next: safePath(next) });
  return redirect(`/sign-in?${query}`, { headers: { "Set-Cookie": await forgetAsk() } });
}

async function leave(to: string, message: string) {
  return redirectWithMessage(to, message, { headers: new Headers({ "Set-Cookie": await forgetAsk() }) });
}

function tooMany(seconds: number): string {
  const minutes = Math.ceil(seconds / 60);
  return `Too many codes were asked for. None was sent. Wait ${minutes} ${minutes === 1 ? "minute" : "minutes"}, and look where spam goes meanwhile.`;
}

function triesLeft(left: number): string {
  return left === 1 ? "One more try is left." : `${left} more tries are left.`;
}

const OVER = { kind: "over" } as const;
const TAKEN =
  "That address signs somebody else in here, maybe another account of yours. Nothing was changed.";

export default function EmailSignIn({ loaderData, actionData }: Route.ComponentProps) {
  const { stage, email, adding, next, inbox } = loaderData;
  const lastResult = actionData?.lastResult;
  return (
    <div className="mx-auto max-w-[34rem] space-y-6 pt-4">
      <h1>{adding ? "Add an e-mail address" : "Sign in by e-mail"}</h1>
      {stage === "ask" && <EmailAskForm next={next} adding={adding} lastResult={lastResult} />}
      {stage === "code" && <EmailCodeForm email={email ?? ""} inbox={inbox} lastResult={lastResult} />}
      {stage === "name" && <NewcomerForm email={email ?? ""} lastResult={lastResult} />}
    </div>
  );
}
