import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { PlatePageData } from "../plate-page.server";

/** That there is a newer version comes first: readers follow old links. */
export function NewerVersion({ plate }: { plate: PlatePageData }) {
  const { newer } = plate;
  if (!newer) return null;
  return (
    <aside className="panel border-l-3 border-l-clay" aria-label="A newer version">
      <p className="font-semibold">
        There is a newer version of this plate:{" "}
        <Link to={`/plates/${newer.publicId}`}>version {newer.version}</Link>
        {newer.withdrawn && ", which was withdrawn"}.
      </p>
      {newer.reason && <p className="break-words">What was wrong with this one: {newer.reason}</p>}
      <p className="text-small soft">This one stays as it is, for those who cited it.</p>
    </aside>
  );
}

export function Versions({ plate }: { plate: PlatePageData }) {
  if (plate.versions.length < 2) return null;
  return (
    <section aria-labelledby="versions" className="grid gap-2 content-start">
      <h2 id="versions">Versions</h2>
      <ol className="grid gap-1">
        {plate.versions.map((one) => (
          <li key={one.publicId}>
            {one.publicId === plate.publicId ? (
              <span className="font-semibold">Version {one.version}, this one</span>
            ) : (
              <Link to={`/plates/${one.publicId}`}>Version {one.version}</Link>
            )}
            , <DateTime at={one.at} dateOnly />
            {one.withdrawn && <span className="text-clay"> (withdrawn)</span>}
          </li>
        ))}
      </ol>
    </section>
  );
}
