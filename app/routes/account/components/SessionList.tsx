import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";

interface ListedSession {
  id: string;
  userAgent: string | null;
  createdAt: string;
  lastSeenAt: string;
  current: boolean;
}

/** Where the person is signed in, each to be ended. There is always one: this one. */
export function SessionList({ sessions }: { sessions: ListedSession[] }) {
  return (
    <section className="space-y-3">
      <h2>Where you are signed in</h2>
      <Table
        caption="Where you are signed in"
        rows={sessions}
        rowKey={(session) => session.id}
        columns={[
          { key: "browser", label: "Browser", cell: (session) => browserName(session.userAgent) },
          { key: "since", label: "Since", cell: (session) => <DateTime at={session.createdAt} /> },
          { key: "seen", label: "Last seen", cell: (session) => <RelativeTime at={session.lastSeenAt} /> },
          { key: "end", label: "End", cell: (session) => <EndButton session={session} /> },
        ]}
      />
      {sessions.length > 1 && (
        <Form method="post">
          <Button variant="quiet" name="intent" value="revoke-others">
            End all other sessions
          </Button>
        </Form>
      )}
    </section>
  );
}

function EndButton({ session }: { session: ListedSession }) {
  if (session.current) return <Tag tone="fen">this browser</Tag>;
  return (
    <Form method="post">
      <input type="hidden" name="session" value={session.id} />
      <Button variant="quiet" size="small" name="intent" value="revoke-session">
        End<span className="sr-only"> this session: {browserName(session.userAgent)}</span>
      </Button>
    </Form>
  );
}

const BROWSERS = [
  [/Firefox\//, "Firefox"],
  [/Edg\//, "Edge"],
  [/Chrom(e|ium)\//, "Chrome or Chromium"],
  [/Safari\//, "Safari"],
] as const;
const SYSTEMS = [
  [/Android/, "Android"],
  [/iPhone|iPad/, "iOS"],
  [/Windows/, "Windows"],
  [/Mac OS X/, "macOS"],
  [/Linux/, "Linux"],
] as const;

/** Enough to tell one's own browsers apart; what is unknown is shown as it was sent. */
function browserName(userAgent: string | null): string {
  if (!userAgent) return "unknown";
  const browser = BROWSERS.find(([pattern]) => pattern.test(userAgent))?.[1];
  const system = SYSTEMS.find(([pattern]) => pattern.test(userAgent))?.[1];
  if (!browser) return userAgent.slice(0, 60);
  return system ? `${browser} on ${system}` : browser;
}
