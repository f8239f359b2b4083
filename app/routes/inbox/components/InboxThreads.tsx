import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { RelativeTime } from "~/components/ui/DateTime";
import { Tag } from "~/components/ui/Tag";
import type { InboxThread } from "~/services/inbox.server";

/** What came, a thread at a time; opening one marks it as read. */
export function InboxThreads({ threads }: { threads: InboxThread[] }) {
  return (
    <ul className="results">
      {threads.map((thread) => (
        <Thread key={thread.publicId} thread={thread} />
      ))}
    </ul>
  );
}

function Thread({ thread }: { thread: InboxThread }) {
  const { items, unread } = thread;
  const shown = items.slice(0, SHOWN);
  return (
    <li className="result grid gap-2">
      <Form method="post" className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <input type="hidden" name="notice" value={thread.publicId} />
        <button
          type="submit"
          name="intent"
          value="open"
          className={`inbox-open ${unread > 0 ? "font-semibold" : ""}`}
        >
          {thread.title}
        </button>
        {unread > 0 && <Tag tone="fen">{unread} unread</Tag>}
        <span className="text-small soft grow">{thread.project.title}</span>
        {unread > 0 && (
          <Button variant="quiet" size="small" name="intent" value="read">
            Mark as read
          </Button>
        )}
      </Form>
      <ul className="grid gap-1">
        {shown.map((item) => (
          <li key={item.publicId} className={item.unread ? "note-line" : "note-line inbox-read"}>
            <p className="text-small">
              {item.words}, <RelativeTime at={item.at} />
            </p>
            {item.line && <p>{item.line}</p>}
          </li>
        ))}
      </ul>
      {items.length > SHOWN && <p className="text-small soft">and {items.length - SHOWN} earlier</p>}
    </li>
  );
}

const SHOWN = 3;
