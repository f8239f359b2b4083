import { Form, Link } from "react-router";
import { MentionLink } from "~/components/mentions/Mentions";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Tag } from "~/components/ui/Tag";
import type { ProjectMention } from "../shape-mention.ts";

export function MentionList({
  id,
  title,
  mentions,
}: {
  id: string;
  title: string;
  mentions: ProjectMention[];
}) {
  if (mentions.length === 0) return null;
  return (
    <section className="grid gap-3" aria-labelledby={id}>
      <h3 id={id} className="text-large">
        {title}
      </h3>
      <ul className="grid gap-3">
        {mentions.map((mention) => (
          <Item key={mention.publicId} mention={mention} />
        ))}
      </ul>
    </section>
  );
}

function Item({ mention }: { mention: ProjectMention }) {
  const { publicId, title, host, state, reason, at, of, decidedBy } = mention;
  const word = WORDS[state];
  return (
    <li className="panel grid gap-2">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <MentionLink {...mention} />
        {title !== host && <span className="provenance">{host}</span>}
        {word && <Tag tone={state === "hidden" ? "plain" : "clay"}>{word}</Tag>}
      </div>
      <p className="text-small soft">
        Cites <Link to={of.path}>{of.title}</Link>; came <DateTime at={at} />.{reason && ` ${reason}`}
        {decidedBy && ` Decided by ${decidedBy}.`}
      </p>
      {DECIDABLE.has(state) && (
        <Form method="post" className="flex flex-wrap gap-2">
          <input type="hidden" name="mention" value={publicId} />
          {(state === "verified" || state === "hidden") && (
            <Button
              name="intent"
              value="show"
              size="small"
              variant={state === "hidden" ? "quiet" : "primary"}
              aria-label={`Show ${title}`}
            >
              Show it
            </Button>
          )}
          {(state === "verified" || state === "shown") && (
            <>
              <Button
                name="intent"
                value="hide"
                size="small"
                variant="quiet"
                aria-label={`Do not show ${title}`}
              >
                {state === "shown" ? "Hide it" : "Do not show it"}
              </Button>
              <Button
                name="intent"
                value="check"
                size="small"
                variant="quiet"
                aria-label={`Look ${title} up again`}
              >
                Look it up again
              </Button>
            </>
          )}
        </Form>
      )}
    </li>
  );
}

const DECIDABLE = new Set<ProjectMention["state"]>(["verified", "shown", "hidden"]);

const WORDS: Partial<Record<ProjectMention["state"], string>> = {
  queued: "not looked up yet",
  hidden: "hidden",
  refused: "no link found",
  gone: "link is gone",
};
