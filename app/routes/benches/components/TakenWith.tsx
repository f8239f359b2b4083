import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { BenchPageData } from "../bench-page.server";

/** The sweeps of this project that say that they were taken with the bench. */
export function TakenWith({ data }: { data: BenchPageData }) {
  const { taken, sweepCount, project } = data;
  const elsewhere = sweepCount - taken.length;
  return (
    <section aria-labelledby="taken-with" className="grid gap-3">
      <h2 id="taken-with">Sweeps taken with it</h2>
      {taken.length === 0 ? (
        <p className="soft">None in this project: choose the bench on a sweep’s page.</p>
      ) : (
        <ul className="grid gap-1">
          {taken.map((sweep) => (
            <li key={sweep.publicId} className="flex flex-wrap items-baseline justify-between gap-x-3">
              <Link
                to={`/projects/${project.publicId}/sweeps/${sweep.publicId}${sweep.unread ? "/reading" : ""}`}
                className="break-words min-w-0"
              >
                {sweep.title}
              </Link>
              <span className="text-small soft">
                <DateTime at={sweep.takenAt ?? sweep.createdAt} dateOnly />
              </span>
            </li>
          ))}
        </ul>
      )}
      {elsewhere > 0 && taken.length < 100 && (
        <p className="text-small soft">
          {elsewhere === 1 ? "One more" : `${elsewhere} more`} in other projects.
        </p>
      )}
    </section>
  );
}
