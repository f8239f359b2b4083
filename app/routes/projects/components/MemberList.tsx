import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { type Column, Table } from "~/components/ui/Table";
import { ROLES } from "../project.schema.ts";

export interface ListedMember {
  userName: string;
  name: string;
  role: (typeof ROLES)[number]["value"];
  callSign: string;
  since: string;
  /** Null where it is not known, or not for the reader. */
  lastActiveAt: string | null;
  self: boolean;
  lastOwner: boolean;
}

export interface MemberListProps {
  members: ListedMember[];
  mayManage: boolean;
  isMember: boolean;
}

/** A project always has an owner, so the list is never empty. */
export function MemberList({ members, mayManage, isMember }: MemberListProps) {
  const columns: Column<ListedMember>[] = [
    {
      key: "name",
      label: "Name",
      cell: (member) => (
        <span>
          {member.name} {member.callSign && <span className="number">{member.callSign} </span>}
          <span className="soft">{member.userName}</span>
        </span>
      ),
    },
    {
      key: "role",
      label: "Role",
      cell: (member) => (mayManage && !member.lastOwner ? <RoleForm member={member} /> : member.role),
    },
    { key: "since", label: "Since", cell: (member) => <DateTime at={member.since} dateOnly /> },
  ];
  if (isMember) {
    columns.push({
      key: "active",
      label: "Last here",
      cell: ({ lastActiveAt }) => (lastActiveAt ? <RelativeTime at={lastActiveAt} /> : "not known"),
    });
  }
  if (mayManage || isMember) {
    columns.push({
      key: "go",
      label: "Remove",
      cell: (member) => <Going member={member} mayManage={mayManage} />,
    });
  }
  return <Table caption="Members" rows={members} rowKey={(member) => member.userName} columns={columns} />;
}

function RoleForm({ member }: { member: ListedMember }) {
  return (
    <Form method="post" className="flex flex-wrap items-center gap-2" key={member.role}>
      <input type="hidden" name="userName" value={member.userName} />
      <select
        name="role"
        defaultValue={member.role}
        className="control"
        aria-label={`Role of ${member.name}`}
      >
        {ROLES.map((role) => (
          <option key={role.value} value={role.value}>
            {role.label}
          </option>
        ))}
      </select>
      <Button variant="quiet" size="small" name="intent" value="change">
        Change<span className="sr-only"> the role of {member.name}</span>
      </Button>
    </Form>
  );
}

function Going({ member, mayManage }: { member: ListedMember; mayManage: boolean }) {
  if (member.lastOwner) return <span className="soft text-small">last owner</span>;
  if (member.self) {
    return (
      <Dialog label="Leave" size="small" title="Leave this project?">
        <p>Your notes and sweeps stay. An owner can add you again.</p>
        <Form method="post" className="mt-3">
          <Button variant="danger" name="intent" value="leave">
            Leave
          </Button>
        </Form>
      </Dialog>
    );
  }
  if (!mayManage) return null;
  return (
    <Dialog label="Remove" variant="danger" size="small" title={`Remove ${member.name}?`}>
      <p>Notes and sweeps stay. The person can be added again.</p>
      <Form method="post" className="mt-3">
        <input type="hidden" name="userName" value={member.userName} />
        <Button variant="danger" name="intent" value="remove">
          Remove
        </Button>
      </Form>
    </Dialog>
  );
}
