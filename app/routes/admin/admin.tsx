import type { ReactNode } from "react";
import { data, Link } from "react-router";
import { requirePerson } from "~/auth/require.server";
import * as files from "~/db/files.server";
import * as jobs from "~/db/jobs.server";
import * as outbox from "~/db/outbox.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as reports from "~/db/reports.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { changeAccount } from "~/services/people.server";
import type { Route } from "./+types/admin";
import { accountSchema } from "./admin.schema.ts";
import { Accounts } from "./components/Accounts.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Administration · Swale" }];

const PAGE_ROWS = 100;

/** Counts and accounts. What private projects hold is not shown: running a service opens no project. */
export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args, "site.administer");
  const page = Math.max(0, Math.trunc(Number(new URL(args.request.url).searchParams.get("page"))) || 0);
  const [users, userCount, visibilities, stored, waiting, mails, openReports] = await Promise.all([
    people.findAll(PAGE_ROWS, page * PAGE_ROWS),
    people.countAll(),
    projects.countByVisibility(),
    files.sumStoredBytes(),
    jobs.countAll(),
    outbox.countByState(),
    reports.countOpen(),
  ]);
  return {
    page,
    userCount,
    more: (page + 1) * PAGE_ROWS < userCount,
    visibilities,
    stored,
    waiting,
    mails,
    openReports,
    users: users.map((user) => ({
      id: user.publicId,
      userName: user.userName,
      name: user.name,
      administrator: user.administrator,
      suspended: user.suspendedAt !== null,
      closed: user.closedAt !== null,
      createdAt: user.createdAt.toISOString(),
      lastSeenAt: user.lastSeenAt?.toISOString() ?? null,
      self: user.id === person.id,
    })),
  };
}

export async function action(args: Route.ActionArgs) {
  await requirePerson(args, "site.administer");
  const submission = parseForm(await args.request.formData(), { schema: accountSchema });
  if (submission.status !== "success") return data({ problem: NOT_UNDERSTOOD }, { status: 400 });
  const user = await people.findByPublicId(submission.value.user);
  if (!user) throw notFound("account");
  const done = await changeAccount(user.id, submission.value.intent);
  if (!done) return data({ problem: LAST_ADMINISTRATOR }, { status: 409 });
  return redirectWithMessage("/admin", `${user.name}: ${DONE[submission.value.intent]}`);
}

const DONE = {
  suspend: "suspended; every session was ended.",
  restore: "restored.",
  promote: "an administrator now.",
  demote: "not an administrator any more.",
};
const NOT_UNDERSTOOD = "The form asked for something this page does not do. Nothing was changed.";
const LAST_ADMINISTRATOR =
  "This is the last administrator who can sign in. Nothing was changed. Make somebody else administrator first.";

export default function Admin({ loaderData, actionData }: Route.ComponentProps) {
  const { visibilities, stored, waiting, mails, openReports, userCount, users, page, more } = loaderData;
  return (
    <div className="space-y-10">
      <h1>Administration</h1>
      <section className="space-y-2">
        <h2>The service</h2>
        <dl className="grid max-w-[36rem] grid-cols-[auto_1fr] gap-x-6 gap-y-1">
          <Fact label="Projects">
            {visibilities.length === 0
              ? "none"
              : visibilities.map(({ visibility, n }) => `${n} ${visibility}`).join(", ")}
          </Fact>
          <Fact label="Stored originals">
            {stored.files} {stored.files === 1 ? "file" : "files"}, {megabytes(stored.bytes)}
          </Fact>
          <Fact label="Waiting work">{waiting}</Fact>
          <Fact label="Mails not sent">
            {mails.waiting + mails.sending} waiting, {mails.failed} given up
          </Fact>
          <Fact label="Accounts">{userCount}</Fact>
        </dl>
        <p className="flex gap-6">
          <Link to="/admin/mail">Mail</Link>
          <Link to="/admin/reports">Reported notes{openReports > 0 && ` (${openReports} to decide)`}</Link>
        </p>
      </section>
      <section className="space-y-3">
        <h2>Accounts</h2>
        {actionData?.problem && (
          <p role="alert" className="field-error">
            {actionData.problem}
          </p>
        )}
        <Accounts users={users} />
        <p className="flex gap-6">
          {page > 0 && <Link to={`?page=${page - 1}`}>Earlier accounts</Link>}
          {more && <Link to={`?page=${page + 1}`}>Later accounts</Link>}
        </p>
      </section>
    </div>
  );
}

function Fact({ label, children }: { label: string; children: ReactNode }) {
  return (
    <>
      <dt className="soft">{label}</dt>
      <dd className="number">{children}</dd>
    </>
  );
}

function megabytes(bytes: number): string {
  return `${(bytes / 1024 / 1024).toFixed(1)}\u2009MB`;
}
