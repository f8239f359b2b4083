import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";

interface ListedInvitation {
  id: string;
  /** Null for a link. */
  email: string | null;
  role: string;
  by: string;
  expiresAt: string;
  uses: number;
  state: "open" | "ended" | "revoked" | "taken";
  takenBy: string | null;
}

export function InvitationList({ invitations }: { invitations: ListedInvitation[] }) {
  if (invitations.length === 0) {
    return (
      <EmptyState drawing="search" title="No invitation is open">
        Make one above; it is listed here with who took it, and can be revoked.
      </EmptyState>
    );
  }
  return (
    <Table
      caption="Invitations"
      showCaption
      rows={invitations}
      rowKey={(one) => one.id}
      columns={[
        {
          key: "to",
          label: "To",
          cell: (one) => <span className="break-all">{one.email ?? "whoever has the link"}</span>,
        },
        { key: "role", label: "As", cell: (one) => one.role },
        { key: "by", label: "By", cell: (one) => one.by },
        {
          key: "until",
          label: "Until",
          cell: (one) => (one.state === "ended" ? "ended" : <DateTime at={one.expiresAt} />),
        },
        { key: "taken", label: "Taken", cell: taken },
        { key: "revoke", label: "Revoke", cell: (one) => <Revoke one={one} /> },
      ]}
    />
  );
}

function taken(one: ListedInvitation): string {
  if (one.state === "taken") return `by ${one.takenBy ?? "a former member"}`;
  if (one.email !== null || one.uses === 0) return "not yet";
  return one.uses === 1 ? "once" : `${one.uses} times`;
}

function Revoke({ one }: { one: ListedInvitation }) {
  if (one.state !== "open") return null;
  return (
    <Form method="post">
      <input type="hidden" name="invitation" value={one.id} />
      <Button variant="quiet" size="small" name="intent" value="revoke">
        Revoke<span className="sr-only"> the invitation to {one.email ?? "whoever has the link"}</span>
      </Button>
    </Form>
  );
}
