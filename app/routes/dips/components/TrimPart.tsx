import { Link } from "react-router";
import { LinkButton } from "~/components/ui/Button";
import type { DipPageData } from "../dip-page.server";

/** What to make of a length so that the dip comes to its design band, and the step that does it. */
export function TrimPart({ data: { judgement, projectId }, inside }: { data: DipPageData; inside: boolean }) {
  const trims = judgement.advice?.trims ?? [];
  if (trims.length === 0) return null;
  return (
    <div className="grid gap-3">
      <h3>
        <Link to="/methods#trim">{inside ? "To bring it to the middle" : "To bring it there"}</Link>
      </h3>
      <ul className="grid gap-4">
        {trims.map(({ part, words, changedSince, plan }) => (
          <li key={part} className="trim">
            <p>
              <strong className="font-mono font-semibold">{words.change}</strong>, {words.aim}, if the dip is
              of this part.
            </p>
            <p className="text-small">
              {words.limits} {words.mind}
            </p>
            <p className="text-small soft">{words.how}</p>
            {changedSince && (
              <p className="text-small">
                This length was changed after this sweep: look at{" "}
                <Link to={`/projects/${projectId}/antenna`}>the antenna as it is now</Link> and at a newer
                sweep before you cut.
              </p>
            )}
            {plan && (
              <div className="no-print">
                <LinkButton to={plan} variant="quiet" size="small">
                  Plan this step
                </LinkButton>
              </div>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
