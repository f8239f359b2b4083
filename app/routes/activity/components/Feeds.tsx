import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import type { Route } from "../+types/activity";

type Data = Route.ComponentProps["loaderData"];

/** The account as a feed: openly where anyone may read, else by addresses of one's own. */
export function Feeds({ data, made }: { data: Data; made: string | null }) {
  const { address, project, feeds, member } = data;
  return (
    <aside className="grid gap-4 content-start min-w-0" aria-labelledby="feeds">
      <h2 id="feeds">Feed</h2>
      {!project.isPrivate && (
        <p>
          <a href={address} type="application/atom+xml">
            This account as an Atom feed
          </a>
        </p>
      )}
      {project.isPrivate && member && (
        <>
          <p className="text-small soft">
            A feed reader can't sign in. Make it an address of its own; whoever has it reads what happened
            here, until you revoke it or leave the project.
          </p>
          {made && (
            <div className="panel grid gap-1" role="status">
              <p className="text-small">Copy it now; it is not shown again.</p>
              <code className="text-small break-all">{`${address}?token=${made}`}</code>
            </div>
          )}
          <Form method="post">
            <Button variant="quiet" name="intent" value="make-feed">
              Make a private feed address
            </Button>
          </Form>
          <ul className="grid gap-3">
            {feeds.map((feed) => (
              <li
                key={feed.publicId}
                className="flex flex-wrap items-center justify-between gap-2 text-small"
              >
                <span>
                  Made <DateTime at={feed.createdAt} dateOnly />,{" "}
                  {feed.lastUsedAt ? (
                    <>
                      last used <RelativeTime at={feed.lastUsedAt} />
                    </>
                  ) : (
                    "never used"
                  )}
                </span>
                <Form method="post">
                  <input type="hidden" name="feed" value={feed.publicId} />
                  <Button variant="quiet" size="small" name="intent" value="revoke-feed">
                    Revoke
                  </Button>
                </Form>
              </li>
            ))}
          </ul>
        </>
      )}
    </aside>
  );
}
