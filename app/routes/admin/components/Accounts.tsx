import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";

interface ListedAccount {
  id: string;
  userName: string;
  name: string;
  administrator: boolean;
  suspended: boolean;
  /** By the person, for good. */
  closed: boolean;
  createdAt: string;
  lastSeenAt: string | null;
  self: boolean;
}

/** Whoever reads this has an account, so the list is never empty. */
export function Accounts({ users }: { users: ListedAccount[] }) {
  return (
    <Table
      caption="Accounts"
      rows={users}
      rowKey={(user) => user.id}
      columns={[
        {
          key: "name",
          label: "Name",
          cell: (user) => (
            <span>
              {user.name} <span className="soft">{user.userName}</span>
            </span>
          ),
        },
        {
          key: "state",
          label: "State",
          cell: (user) => (
            <span className="flex flex-wrap gap-1">
              {user.administrator && <Tag tone="fen">administrator</Tag>}
              <StateTag user={user} />
            </span>
          ),
        },
        { key: "since", label: "Since", cell: (user) => <DateTime at={user.createdAt} dateOnly /> },
        {
          key: "seen",
          label: "Last seen",
          cell: (user) => (user.lastSeenAt ? <RelativeTime at={user.lastSeenAt} /> : "never"),
        },
        { key: "change", label: "Change", cell: (user) => <Changes user={user} /> },
      ]}
    />
  );
}

function StateTag({ user }: { user: ListedAccount }) {
  if (user.closed) return <Tag>closed</Tag>;
  return user.suspended ? <Tag tone="alarm">suspended</Tag> : <Tag>active</Tag>;
}

function Changes({ user }: { user: ListedAccount }) {
  if (user.self) return <span className="soft text-small">you</span>;
  if (user.closed) return null;
  return (
    <span className="flex flex-wrap gap-2">
      {user.suspended ? (
        <Change user={user} intent="restore" label="Restore" />
      ) : (
        <Dialog label="Suspend" variant="danger" size="small" title={`Suspend ${user.name}?`}>
          <p>Every session ends and tokens open nothing. What was stored stays. It can be restored.</p>
          <div className="mt-3">
            <Change user={user} intent="suspend" label="Suspend" danger />
          </div>
        </Dialog>
      )}
      {user.administrator ? (
        <Change user={user} intent="demote" label="Make a member" />
      ) : (
        <Change user={user} intent="promote" label="Make administrator" />
      )}
    </span>
  );
}

interface ChangeProps {
  user: ListedAccount;
  intent: "suspend" | "restore" | "promote" | "demote";
  label: string;
  danger?: boolean;
}

function Change({ user, intent, label, danger = false }: ChangeProps) {
  return (
    <Form method="post">
      <input type="hidden" name="user" value={user.id} />
      <Button variant={danger ? "danger" : "quiet"} size="small" name="intent" value={intent}>
        {label}
        <span className="sr-only">: {user.name}</span>
      </Button>
    </Form>
  );
}
