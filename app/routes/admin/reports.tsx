import { data } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as reports from "~/db/reports.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { closeReport, OUTCOMES } from "~/services/reports.server";
import type { Route } from "./+types/reports";
import { reportsSchema } from "./admin.schema.ts";
import { ClosedReports, OpenReports } from "./components/Reports.tsx";

export const meta: Route.MetaFunction = () => [{ title: "Reported notes · Swale" }];

const CLOSED_ROWS = 50;

/** The notes that somebody reported, and nothing else of their projects. */
export async function loader(args: Route.LoaderArgs) {
  await requirePerson(args, "site.administer");
  const [open, closed] = await Promise.all([reports.findAll("open"), reports.findAll("closed", CLOSED_ROWS)]);
  const shape = ({ report, note, author, reporter }: (typeof open)[number]) => ({
    id: report.publicId,
    reason: report.reason,
    at: report.createdAt.toISOString(),
    reporter: reporter ? `${reporter.name} (${reporter.userName})` : "a former member",
    author: author ? `${author.name} (${author.userName})` : "a former member",
    hasAuthor: author !== null,
    body: note.removedAt ? null : note.body,
    changedSince: note.editedAt !== null && note.editedAt > report.createdAt,
    closedAt: report.closedAt?.toISOString() ?? null,
    outcome: report.outcome,
  });
  return { open: open.map(shape), closed: closed.map(shape) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args, "site.administer");
  const submission = parseForm(await args.request.formData(), { schema: reportsSchema });
  if (submission.status !== "success") throw data("No such form. Nothing was changed.", 400);
  const { report, intent } = submission.value;
  const done = await closeReport(report, intent, person);
  if (done === "missing") throw notFound("open report");
  if (done === "last-administrator") return data({ problem: LAST_ADMINISTRATOR }, { status: 409 });
  return redirectWithMessage("/admin/reports", OUTCOMES[intent]);
}

const LAST_ADMINISTRATOR =
  "The author is the last administrator who can sign in. Nothing was changed. Make somebody else administrator first.";

export default function AdminReports({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <div className="max-w-[60rem] space-y-8">
      <Breadcrumbs items={[{ label: "Administration", to: "/admin" }]} />
      <h1>Reported notes</h1>
      {actionData && "problem" in actionData && (
        <p role="alert" className="field-error">
          {actionData.problem}
        </p>
      )}
      <OpenReports reports={loaderData.open} />
      {loaderData.closed.length > 0 && <ClosedReports reports={loaderData.closed} />}
    </div>
  );
}
