import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { BenchPageData } from "../bench-page.server";

/** Every version, the newest first, each an address; and the way to compare two of them. */
export function Versions({ data }: { data: BenchPageData }) {
  const { versions, version } = data;
  if (versions.length < 2) return null;
  return (
    <section aria-labelledby="versions" className="grid gap-3">
      <h2 id="versions">Versions</h2>
      <ol className="grid gap-2">
        {versions.map((one) => (
          <li key={one.publicId} className="grid gap-0.5">
            <p className="flex flex-wrap items-baseline justify-between gap-2">
              <Link
                to={`?version=${one.publicId}`}
                aria-current={one.publicId === version.publicId ? "true" : undefined}
                className={one.publicId === version.publicId ? "font-semibold" : ""}
              >
                Version {one.number}
              </Link>
              <span className="text-small soft">
                from <DateTime at={one.validFrom} dateOnly />
              </span>
            </p>
            {one.remark && <p className="text-small break-words min-w-0">{one.remark}</p>}
            {one.publicId !== version.publicId && (
              <p className="text-small">
                <Link to={`compare?version=${version.publicId}&with=${one.publicId}`}>
                  Compare with version {version.number}
                </Link>
              </p>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}
