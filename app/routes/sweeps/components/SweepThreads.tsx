import { Link } from "react-router";
import { Thread } from "~/components/notes/Thread";
import { VerdictForm } from "~/components/notes/VerdictForm";
import { VerdictTag } from "~/components/ui/Tag";
import { formatFrequency, formatSwr } from "~/measurement/units";
import type { SweepPageData } from "../sweep";
import { searchWith } from "../sweeps.schema";

/** The chosen dip's thread beside the chart; the sweep's own thread under it. */
export function SweepThreads({ data }: { data: SweepPageData }) {
  const { thread, project, may } = data;
  const dip = data.dips.find((one) => one.publicId === thread?.publicId);
  return (
    <aside
      className="thread-panel"
      id="thread"
      aria-label={thread ? "Thread of the chosen dip" : "Notes on the sweep"}
    >
      {thread && (
        <section aria-labelledby="dip-thread" className="panel grid gap-4">
          <div className="flex flex-wrap items-baseline justify-between gap-2">
            <h2 id="dip-thread" className="font-mono text-large">
              {dip ? formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz) : "A dip not found now"}
            </h2>
            <VerdictTag verdict={thread.verdict} />
          </div>
          {dip && !dip.edge && (
            <p className="text-small font-mono">
              SWR{" "}
              {formatSwr(
                dip.minimumSwr,
                dip.minimumSwrLow ?? dip.minimumSwrNoiseLow,
                dip.minimumSwrHigh ?? dip.minimumSwrNoiseHigh,
              )}
            </p>
          )}
          <p className="flex flex-wrap gap-4 text-small">
            <Link to={`/projects/${project.publicId}/dips/${thread.publicId}`}>All about this dip</Link>
            <Link to={searchWith(data.view, { dip: null }) || "?"} preventScrollReset>
              Close
            </Link>
          </p>
          <VerdictForm
            projectId={project.publicId}
            dipId={thread.publicId}
            verdict={thread.verdict}
            verdictText={thread.verdictText}
            verdictBy={thread.verdictBy}
            may={data.mayVerdict}
          />
          <Thread
            projectId={project.publicId}
            place={{ dip: thread.publicId }}
            thread={thread.notes}
            mayWrite={may.write}
          />
        </section>
      )}
      <section aria-labelledby="sweep-thread" className="grid gap-3">
        <h2 id="sweep-thread">Notes on the sweep</h2>
        <Thread
          projectId={project.publicId}
          place={{ sweep: data.sweep.publicId }}
          thread={data.sweepThread}
          mayWrite={may.write}
        />
      </section>
    </aside>
  );
}
