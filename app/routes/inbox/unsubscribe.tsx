import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { notFound } from "~/errors";
import { isWayOut, takeWayOut } from "~/services/unsubscribe.server";
import type { Route } from "./+types/unsubscribe";

export const meta: Route.MetaFunction = () => [
  { title: "No more mails · Swale" },
  { name: "robots", content: "noindex" },
  { name: "referrer", content: "no-referrer" },
];

/** Looking changes nothing: programs that look at links for somebody would else unsubscribe them. */
export async function loader({ params }: Route.LoaderArgs) {
  if (!(await isWayOut(params.token))) throw notFound("way out of mails");
  return null;
}

/** From the page's buttons, or from a mail program that was pressed (RFC 8058): without cookies, and without a page. */
export async function action({ params, request }: Route.ActionArgs) {
  const form = await request.formData();
  const what = form.get("what") === "all" ? "all" : "project";
  if ((await takeWayOut(params.token, what)) === "missing") throw notFound("way out of mails");
  return { done: what } as const;
}

export default function Unsubscribe({ actionData }: Route.ComponentProps) {
  const done = actionData?.done;
  return (
    <div className="grid gap-5 max-w-[40rem]">
      <h1>{done ? "No more mails" : "Stop these mails?"}</h1>
      {done ? (
        <p>
          {done === "all"
            ? "No mails about any project come to you any more; those about signing in still do."
            : "No mails about that project come to you any more. Its news still stands in your inbox."}{" "}
          <Link to="/settings/mail">Change it again</Link>
        </p>
      ) : (
        <>
          <p>You need not sign in for this. What was said stays in your inbox here.</p>
          <Form method="post" className="flex flex-wrap gap-3">
            <Button name="what" value="project">
              No mails about this project
            </Button>
            <Button variant="quiet" name="what" value="all">
              No mails about any project
            </Button>
          </Form>
        </>
      )}
    </div>
  );
}
