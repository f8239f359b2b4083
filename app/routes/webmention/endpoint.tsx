import { data, Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { clientAddressContext } from "~/context";
import { env } from "~/env.server";
import { receive } from "~/services/webmention/receive.server";
import type { Route } from "./+types/endpoint";
import { webmentionSchema } from "./webmention.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Say that you cite something here · Swale" }];

export function headers({ actionHeaders }: Route.HeadersArgs) {
  return actionHeaders;
}

export function loader({ request }: Route.LoaderArgs) {
  return { origin: env.BASE_URL, target: new URL(request.url).searchParams.get("target") ?? "" };
}

/** Where other sites say that they cite a plate or a write-up: W3C Webmention 3.2. */
export async function action({ request, context }: Route.ActionArgs) {
  const form = await request.formData();
  const parsed = webmentionSchema.safeParse(Object.fromEntries(form));
  const twice = form.getAll("source").length > 1 || form.getAll("target").length > 1;
  if (!parsed.success || twice) return refused("It takes one source and one target.", 400);
  const outcome = await receive(parsed.data, context.get(clientAddressContext));
  switch (outcome.kind) {
    case "queued":
      return data({ queued: true as const, source: parsed.data.source }, { status: 202 });
    case "refused":
      return refused(outcome.problem, 400, parsed.data);
    case "too-many": {
      const minutes = Math.ceil(outcome.waitSeconds / 60);
      const headers = { "Retry-After": String(outcome.waitSeconds) };
      return data(
        {
          queued: false as const,
          problem: `That is a lot of them. Try again in ${minutes} min.`,
          ...parsed.data,
        },
        { status: 429, headers },
      );
    }
    default:
      return outcome satisfies never;
  }
}

function refused(problem: string, status: number, form = { source: "", target: "" }) {
  return data({ queued: false as const, problem: `${problem} Nothing was stored.`, ...form }, { status });
}

export default function Endpoint({ loaderData, actionData }: Route.ComponentProps) {
  const busy = useNavigation().state === "submitting";
  const again = actionData && !actionData.queued ? actionData : null;
  return (
    <div className="grid gap-6 max-w-[48rem]">
      <h1>Say that you cite something here</h1>
      <p>
        Wrote a page that links to a plate or a write-up? Say where, and it is looked up: if the link is
        there, the owner of the project can show your page under what it cites. Sites that speak{" "}
        <a href="https://www.w3.org/TR/webmention/">Webmention</a> do this by themselves, at{" "}
        <code className="break-all">{loaderData.origin}/webmention</code>.
      </p>
      {actionData?.queued && (
        <p role="status" className="panel">
          Thank you. <span className="break-all">{actionData.source}</span> is looked up in a while, and shown
          once the owner says so. Sent again, it is looked up again.
        </p>
      )}
      <Form method="post" className="panel grid gap-4">
        {again && (
          <p role="alert" className="field-error">
            {again.problem}
          </p>
        )}
        <InputField
          name="source"
          type="url"
          label="Your page"
          defaultValue={again?.source}
          maxLength={2000}
          required
        />
        <InputField
          name="target"
          type="url"
          label="What it links to here"
          defaultValue={again?.target || loaderData.target}
          maxLength={2000}
          required
        />
        <div>
          <Button busy={busy}>Send it</Button>
        </div>
      </Form>
    </div>
  );
}
