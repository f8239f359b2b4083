import { Link } from "react-router";
import { VerdictTag } from "~/components/ui/Tag";
import { formatFrequency } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";

/** Dips that were talked about and that the current analysis does not find: their threads stay. */
export function LostDips({ data }: { data: SweepPageData }) {
  if (data.lostDips.length === 0) return null;
  return (
    <div className="grid gap-1 text-small">
      <h3>Not found with the current settings</h3>
      <ul className="grid gap-1">
        {data.lostDips.map((dip) => (
          <li key={dip.publicId} className="flex flex-wrap items-baseline gap-2">
            <Link to={`/projects/${data.project.publicId}/dips/${dip.publicId}`} className="font-mono">
              {formatFrequency(dip.frequencyHz, null)}
            </Link>
            <VerdictTag verdict={dip.verdict} />
            <span className="soft">{dip.noteCount === 1 ? "1 note" : `${dip.noteCount} notes`}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
