import { Form } from "react-router";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";

interface ListedWay {
  provider: "github" | "email";
  subject: string;
  since: string;
  getsMails: boolean;
}

interface WayListProps {
  ways: ListedWay[];
  email: string | null;
  alsoByMail: boolean;
}

export function WayList({ ways, email, alsoByMail }: WayListProps) {
  return (
    <section className="space-y-3">
      {ways.length === 0 ? (
        <EmptyState drawing="search" title="No way is kept yet">
          Add one below, so that you get in again.
        </EmptyState>
      ) : (
        <Table
          caption="How you sign in"
          rows={ways}
          rowKey={(way) => `${way.provider} ${way.subject}`}
          columns={[
            {
              key: "way",
              label: "Way",
              cell: (way) => (
                <span className="break-all">
                  {wordsOf(way)} {way.getsMails && <Tag tone="fen">gets your mails</Tag>}
                </span>
              ),
            },
            { key: "since", label: "Since", cell: (way) => <DateTime at={way.since} dateOnly /> },
            { key: "change", label: "Change", cell: (way) => <Changes way={way} last={ways.length === 1} /> },
          ]}
        />
      )}
      <p className="soft max-w-[72ch]">
        {email ? `Mails go to ${email}.` : "No address is known: mails can't reach you. Add one."}
        {alsoByMail && " It was confirmed before, so a code sent there signs you in too."}
      </p>
    </section>
  );
}

function wordsOf(way: ListedWay): string {
  return way.provider === "email" ? `Codes to ${way.subject}` : `GitHub, account number ${way.subject}`;
}

function Changes({ way, last }: { way: ListedWay; last: boolean }) {
  return (
    <span className="flex flex-wrap gap-2">
      {way.provider === "email" && !way.getsMails && (
        <Form method="post">
          <input type="hidden" name="subject" value={way.subject} />
          <Button variant="quiet" size="small" name="intent" value="mails-to">
            Send mails here<span className="sr-only">: {way.subject}</span>
          </Button>
        </Form>
      )}
      {last ? (
        <span className="soft text-small">your only way in</span>
      ) : (
        <Dialog label="Take away" variant="danger" size="small" title="Take this way away?">
          <p>{wordsOf(way)} will not sign you in any more. You can add it again. Sessions stay.</p>
          <Form method="post" className="mt-3">
            <input type="hidden" name="provider" value={way.provider} />
            <input type="hidden" name="subject" value={way.subject} />
            <Button variant="danger" name="intent" value="remove">
              Take it away
            </Button>
          </Form>
        </Dialog>
      )}
    </span>
  );
}

export function AddWay() {
  return (
    <section className="space-y-3">
      <h2>Add another</h2>
      <div className="flex flex-wrap gap-3">
        <LinkButton to="/auth/email?add=yes" variant="quiet" icon="add">
          An e-mail address
        </LinkButton>
        <Form method="post" reloadDocument>
          <Button variant="quiet" icon="add" name="intent" value="add-github">
            GitHub
          </Button>
        </Form>
      </div>
      <p className="soft text-small">
        Each is confirmed before it counts, and your address is told of every change.
      </p>
    </section>
  );
}
