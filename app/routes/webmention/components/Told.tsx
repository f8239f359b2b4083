import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import { Tag } from "~/components/ui/Tag";

interface ToldPage {
  key: number;
  target: string;
  state: "queued" | "sent" | "none" | "failed";
  reason: string;
  at: Date;
  writeUp: { publicId: string; title: string };
}

/** The pages elsewhere that were told of a published write-up that links to them. */
export function Told({ told }: { told: ToldPage[] }) {
  if (told.length === 0) return null;
  return (
    <section className="grid gap-3" aria-labelledby="told">
      <h3 id="told" className="text-large">
        Told of your write-ups
      </h3>
      <p className="soft text-small max-w-[72ch]">
        Pages that a published write-up links to and that take Webmentions are told so, and told again when it
        changes.
      </p>
      <ul className="grid gap-2">
        {told.map(({ key, target, state, reason, at, writeUp }) => (
          <li key={key} className="text-small">
            <span className="break-all">{target}</span>{" "}
            <Tag tone={state === "sent" ? "moss" : state === "failed" ? "clay" : "plain"}>{WORDS[state]}</Tag>{" "}
            <span className="soft">
              by <Link to={`/write-ups/${writeUp.publicId}`}>{writeUp.title}</Link>, <DateTime at={at} />.
              {reason && ` ${reason}`}
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

const WORDS = { queued: "waits", sent: "told", none: "takes none", failed: "could not be told" };
