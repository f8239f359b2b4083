import { Link } from "react-router";
import type { TrailPageData } from "../trail-page.server";

type Event = TrailPageData["happened"][number];

/** What the trail did besides moving. */
export function Happened({ data: { happened, project } }: { data: TrailPageData }) {
  if (happened.length === 0) return null;
  return (
    <ul className="text-small grid gap-1">
      {happened.map(({ kind, sweeps, other }) => (
        <li key={kind + sweeps.join()}>
          {SAID[kind]}
          {other && (
            <>
              {" "}
              <Link to={`/projects/${project.publicId}/trails/${other.publicId}`}>{other.label}</Link> in
            </>
          )}{" "}
          {sweeps.map((title) => `“${title}”`).join(", ")}
        </li>
      ))}
    </ul>
  );
}

const SAID: Record<Event["kind"], string> = {
  appears: "Appeared in",
  vanishes: "No longer seen from",
  missed: "Not seen on the way in",
  "not-covered": "Not reached on the way by",
  "splits-from": "Split from the trail",
  "merges-into": "Merged into the trail",
};
