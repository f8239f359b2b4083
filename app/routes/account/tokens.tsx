import { data } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as tokens from "~/db/tokens.server";
import { env } from "~/env.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { makeToken } from "~/services/tokens.server";
import type { Route } from "./+types/tokens";
import { tokensSchema } from "./account.schema.ts";
import { MakeTokenForm } from "./components/MakeTokenForm.tsx";
import { TokenList } from "./components/TokenList.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Tokens for scripts · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const rows = await tokens.findAllByUser(person.id);
  return {
    origin: env.BASE_URL,
    tokens: rows.map((row) => ({
      id: row.publicId,
      label: row.label,
      scope: row.scope,
      createdAt: row.createdAt.toISOString(),
      lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: tokensSchema });
  if (submission.status !== "success") {
    return data({ lastResult: submission.reply(), made: null }, { status: 400 });
  }
  const value = submission.value;
  switch (value.intent) {
    case "make": {
      const text = await makeToken(person.id, value.label, value.scope);
      // The only answer that ever holds the token's text: no cache may keep it.
      return data(
        { lastResult: submission.reply({ resetForm: true }), made: { text, label: value.label } },
        { headers: { "Cache-Control": "no-store" } },
      );
    }
    case "revoke":
      await tokens.revoke(person.id, value.token);
      return redirectWithMessage("/settings/tokens", "The token was revoked: it opens nothing any more.");
    default:
      return value satisfies never;
  }
}

export function headers({ actionHeaders }: Route.HeadersArgs) {
  return actionHeaders;
}

export default function Tokens({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[48rem] space-y-8">
      <div className="space-y-2">
        <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
        <h1>Tokens for scripts</h1>
        <p className="soft">
          A program sends a token as <code>Authorization: Bearer …</code> and then acts in your name, with
          your roles. What it can ask is written in{" "}
          <a href="/api/v1/openapi.json">{loaderData.origin}/api/v1/openapi.json</a>.
        </p>
      </div>
      {actionData?.made && <MadeToken made={actionData.made} />}
      <MakeTokenForm lastResult={actionData?.lastResult} />
      <TokenList tokens={loaderData.tokens} />
    </div>
  );
}

function MadeToken({ made }: { made: { text: string; label: string } }) {
  return (
    <section role="status" className="panel space-y-2 border-l-3 border-l-moss">
      <h2>The token “{made.label}”</h2>
      <p>Copy it now. It is shown this once and can't be shown again, because only its hash is kept.</p>
      <p>
        <code className="break-all select-all">{made.text}</code>
      </p>
    </section>
  );
}
