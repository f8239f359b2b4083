import { Fragment } from "react";
import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { ActivityDay, ActivityLine } from "~/services/activity-lines";

/** The account day by day, newest first. */
export function Days({ days }: { days: ActivityDay[] }) {
  return (
    <div className="grid gap-6">
      {days.map(({ day, lines }) => (
        <section key={day} aria-label={day}>
          <h3 className="text-small soft">
            <DateTime at={`${day}T00:00:00Z`} dateOnly />
          </h3>
          <ul className="results">
            {lines.map((line) => (
              <Line key={line.key} line={line} />
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}

function Line({ line }: { line: ActivityLine }) {
  const at = new Date(line.at).toISOString().slice(11, 16);
  return (
    <li className="result flex flex-wrap items-baseline justify-between gap-x-4">
      <p>
        {line.words}{" "}
        {line.items.map(({ title, to }, i) => (
          <Fragment key={`${to} ${title}`}>
            {i > 0 && ", "}
            {to ? <Link to={to}>{title || "it"}</Link> : title}
          </Fragment>
        ))}
        {line.more > 0 && ` and ${line.more} more`}
      </p>
      <p className="text-small soft">
        {line.by.length > 0 && `${line.by.join(", ")}, `}
        <time dateTime={new Date(line.at).toISOString()}>{at} UTC</time>
      </p>
    </li>
  );
}
