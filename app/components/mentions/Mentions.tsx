import { DateTime } from "~/components/ui/DateTime";

interface Mention {
  source: string;
  title: string;
  host: string;
  at: string | Date;
}

/** Where a plate or a write-up was cited; nothing where it was not. */
export function Mentions({ mentions }: { mentions: readonly Mention[] }) {
  if (mentions.length === 0) return null;
  return (
    <section className="grid gap-2" aria-labelledby="mentions">
      <h2 id="mentions" className="text-large">
        Cited elsewhere
      </h2>
      <ul className="grid gap-1">
        {mentions.map((mention) => (
          <li key={mention.source}>
            <MentionLink {...mention} />
            <span className="soft text-small">
              {" "}
              {mention.title !== mention.host && `${mention.host}, `}
              <DateTime at={mention.at} dateOnly />
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

/** To a page that a stranger wrote: nothing is told to it, and nothing of ours stands behind it. */
export function MentionLink({ source, title }: Pick<Mention, "source" | "title">) {
  return (
    <a href={source} rel="nofollow ugc noopener noreferrer external" className="break-words">
      {title}
    </a>
  );
}
