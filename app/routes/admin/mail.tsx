import { data, Link } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as outbox from "~/db/outbox.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/mail";
import { mailSchema } from "./admin.schema.ts";
import { MailList } from "./components/MailList.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Mail · Swale" }];

const PAGE_ROWS = 100;
/** What is worth looking at, and the way to see the rest. */
const SHOWN = { open: ["failed", "waiting", "sending"], sent: ["sent"] } as const;

/** Addresses and states. Subjects and texts are not shown: they may tell of private projects. */
export async function loader(args: Route.LoaderArgs) {
  await requirePerson(args, "site.administer");
  const query = new URL(args.request.url).searchParams;
  const shown = query.get("shown") === "sent" ? ("sent" as const) : ("open" as const);
  const page = Math.max(0, Math.trunc(Number(query.get("page"))) || 0);
  const [rows, counts] = await Promise.all([
    outbox.findPage([...SHOWN[shown]], PAGE_ROWS + 1, page * PAGE_ROWS),
    outbox.countByState(),
  ]);
  return {
    shown,
    page,
    counts,
    more: rows.length > PAGE_ROWS,
    mails: rows.slice(0, PAGE_ROWS).map((row) => ({
      ...row,
      nextAt: row.nextAt.toISOString(),
      createdAt: row.createdAt.toISOString(),
      sentAt: row.sentAt?.toISOString() ?? null,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  await requirePerson(args, "site.administer");
  const submission = parseForm(await args.request.formData(), { schema: mailSchema });
  if (submission.status !== "success") throw data("No such form. Nothing was changed.", 400);
  const { mail } = submission.value;
  if (!(await outbox.retry(mail))) throw notFound("mail that waits or failed");
  return redirectWithMessage("/admin/mail", "It is tried again now.");
}

export default function AdminMail({ loaderData }: Route.ComponentProps) {
  const { counts, mails, shown, page, more } = loaderData;
  const at = (n: number) => `?${new URLSearchParams({ shown, page: String(n) })}`;
  return (
    <div className="space-y-6">
      <Breadcrumbs items={[{ label: "Administration", to: "/admin" }]} />
      <h1>Mail</h1>
      <p className="soft max-w-[72ch]">
        {counts.waiting} waiting, {counts.sending} being sent, {counts.sent} sent in the last 60 days,{" "}
        {counts.failed} given up. A mail that was not taken is tried again for two days, then it is given up
        and stays here.
      </p>
      <p className="flex gap-6">
        {shown === "open" ? <span>Not sent</span> : <Link to="?shown=open">Not sent</Link>}
        {shown === "sent" ? <span>Sent</span> : <Link to="?shown=sent">Sent</Link>}
      </p>
      <MailList mails={mails} />
      <p className="flex gap-6">
        {page > 0 && <Link to={at(page - 1)}>Newer</Link>}
        {more && <Link to={at(page + 1)}>Older</Link>}
      </p>
    </div>
  );
}
