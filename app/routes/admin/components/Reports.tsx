import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";

interface ListedReport {
  id: string;
  reason: string;
  at: string;
  reporter: string;
  author: string;
  hasAuthor: boolean;
  /** Null where the note is removed. */
  body: string | null;
  changedSince: boolean;
  closedAt: string | null;
  outcome: string;
}

export function OpenReports({ reports }: { reports: ListedReport[] }) {
  if (reports.length === 0) {
    return (
      <EmptyState drawing="search" title="No note is reported">
        When somebody reports one, it stands here and a mail says so.
      </EmptyState>
    );
  }
  return (
    <ol className="grid gap-6" aria-label="Reported notes">
      {reports.map((report) => (
        <li key={report.id} className="panel space-y-3">
          <p>
            <strong>{report.reporter}</strong>, <DateTime at={report.at} />: {report.reason}
          </p>
          <div className="space-y-1">
            <p className="soft text-small">
              The note, by {report.author} {report.changedSince && <Tag tone="clay">changed since</Tag>}
            </p>
            {report.body === null ? (
              <p className="soft">It was removed meanwhile.</p>
            ) : (
              <blockquote className="note-line max-h-[20rem] overflow-auto whitespace-pre-wrap">
                {report.body}
              </blockquote>
            )}
          </div>
          <div className="flex flex-wrap gap-2">
            <Decide report={report} intent="leave" label="Leave the note" />
            <Dialog label="Remove the note" variant="danger" size="small" title="Remove the note?">
              <p>Its text goes for good. What answers it stays.</p>
              <Decide report={report} intent="remove" label="Remove it" danger />
            </Dialog>
            {report.hasAuthor && (
              <Dialog
                label="Remove it and suspend its author"
                variant="danger"
                size="small"
                title={`Suspend ${report.author}?`}
              >
                <p>
                  The note's text goes for good. Every session of the author ends. The account can be
                  restored.
                </p>
                <Decide report={report} intent="suspend" label="Remove and suspend" danger />
              </Dialog>
            )}
          </div>
        </li>
      ))}
    </ol>
  );
}

interface DecideProps {
  report: ListedReport;
  intent: "leave" | "remove" | "suspend";
  label: string;
  danger?: boolean;
}

function Decide({ report, intent, label, danger = false }: DecideProps) {
  return (
    <Form method="post" className={danger ? "mt-3" : undefined}>
      <input type="hidden" name="report" value={report.id} />
      <Button variant={danger ? "danger" : "quiet"} size="small" name="intent" value={intent}>
        {label}
      </Button>
    </Form>
  );
}

export function ClosedReports({ reports }: { reports: ListedReport[] }) {
  return (
    <Table
      caption="Decided lately"
      showCaption
      rows={reports}
      rowKey={(report) => report.id}
      columns={[
        { key: "reason", label: "Reason", cell: (report) => report.reason },
        { key: "author", label: "Author", cell: (report) => report.author },
        { key: "outcome", label: "Outcome", cell: (report) => report.outcome },
        {
          key: "at",
          label: "Decided",
          cell: (report) => report.closedAt && <DateTime at={report.closedAt} />,
        },
      ]}
    />
  );
}
