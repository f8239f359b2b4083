import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";

interface ListedToken {
  id: string;
  label: string;
  scope: "read" | "write";
  createdAt: string;
  lastUsedAt: string | null;
}

export function TokenList({ tokens }: { tokens: ListedToken[] }) {
  return (
    <section className="space-y-3">
      <h2>Your tokens</h2>
      {tokens.length === 0 ? (
        <EmptyState drawing="search" title="No tokens">
          Make one above when a script is to work for you.
        </EmptyState>
      ) : (
        <Table
          caption="Your tokens"
          rows={tokens}
          rowKey={(token) => token.id}
          columns={[
            { key: "label", label: "For", cell: (token) => token.label },
            { key: "scope", label: "May", cell: (token) => token.scope },
            { key: "made", label: "Made", cell: (token) => <DateTime at={token.createdAt} dateOnly /> },
            {
              key: "used",
              label: "Last used",
              cell: (token) => (token.lastUsedAt ? <RelativeTime at={token.lastUsedAt} /> : "never"),
            },
            { key: "revoke", label: "Revoke", cell: (token) => <RevokeButton token={token} /> },
          ]}
        />
      )}
    </section>
  );
}

function RevokeButton({ token }: { token: ListedToken }) {
  return (
    <Dialog label="Revoke" variant="danger" size="small" title={`Revoke “${token.label}”?`}>
      <p>Scripts that use it are refused from now on. What they stored is kept. This can't be undone.</p>
      <Form method="post" className="mt-3">
        <input type="hidden" name="token" value={token.id} />
        <Button variant="danger" name="intent" value="revoke">
          Revoke it
        </Button>
      </Form>
    </Dialog>
  );
}
