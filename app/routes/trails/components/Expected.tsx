import { Link } from "react-router";
import type { TrailPageData } from "../trail-page.server";

/** Where steps were to put the trail, and where it came out. */
export function Expected({ data: { expected, project } }: { data: TrailPageData }) {
  if (expected.length === 0) return null;
  return (
    <div className="grid gap-2">
      <h3>Expected</h3>
      <ul className="text-small grid gap-2">
        {expected.map((place) => (
          <li key={place.step.publicId}>
            After{" "}
            <Link to={`/projects/${project.publicId}/steps/${place.step.publicId}`}>{place.step.title}</Link>
            {place.step.planned && " (planned)"}: <span className="font-mono">{place.frequency}</span>
            {place.interval && `, between ${place.interval}`}.{" "}
            {place.came && (
              <strong className="font-semibold">
                It came out at {place.came.frequency} in “{place.came.sweepTitle}”{WORDS[String(place.met)]}
              </strong>
            )}{" "}
            <span className="soft">{place.how}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}

const WORDS: Record<string, string> = {
  true: ": inside what was expected.",
  false: ": outside what was expected.",
  null: ".",
};
