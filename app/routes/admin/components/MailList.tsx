import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";

interface ListedMail {
  publicId: string;
  toAddress: string;
  state: "waiting" | "sending" | "sent" | "failed";
  attempts: number;
  nextAt: string;
  lastError: string | null;
  createdAt: string;
  sentAt: string | null;
}

const TONES = { waiting: "clay", sending: "heather", sent: "moss", failed: "alarm" } as const;
const WORDS = { waiting: "waiting", sending: "being sent", sent: "sent", failed: "given up" };

export function MailList({ mails }: { mails: ListedMail[] }) {
  if (mails.length === 0) {
    return (
      <EmptyState drawing="search" title="No mails here">
        What invitations, codes and digests send shows up as they are written.
      </EmptyState>
    );
  }
  return (
    <Table
      caption="Mails"
      rows={mails}
      rowKey={(mail) => mail.publicId}
      columns={[
        { key: "to", label: "To", cell: (mail) => <span className="break-all">{mail.toAddress}</span> },
        {
          key: "state",
          label: "State",
          cell: (mail) => <Tag tone={TONES[mail.state]}>{WORDS[mail.state]}</Tag>,
        },
        { key: "made", label: "Written", cell: (mail) => <DateTime at={mail.createdAt} /> },
        { key: "attempts", label: "Attempts", numeric: true, cell: (mail) => mail.attempts },
        { key: "what", label: "What came of it", cell: (mail) => <Outcome mail={mail} /> },
        { key: "retry", label: "Again", cell: (mail) => <Again mail={mail} /> },
      ]}
    />
  );
}

function Outcome({ mail }: { mail: ListedMail }) {
  if (mail.state === "sent" && mail.sentAt) return <DateTime at={mail.sentAt} />;
  return (
    <span className="break-words">
      {mail.lastError ?? "not tried yet"}
      {mail.state === "waiting" && mail.attempts > 0 && (
        <span className="soft">
          , next try <DateTime at={mail.nextAt} />
        </span>
      )}
    </span>
  );
}

function Again({ mail }: { mail: ListedMail }) {
  if (mail.state !== "failed" && mail.state !== "waiting") return null;
  return (
    <Form method="post">
      <input type="hidden" name="mail" value={mail.publicId} />
      <Button variant="quiet" size="small" name="intent" value="retry">
        Try now<span className="sr-only"> to send to {mail.toAddress}</span>
      </Button>
    </Form>
  );
}
