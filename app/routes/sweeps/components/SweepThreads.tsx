import { useEffect, useRef } from "react";
import { Link } from "react-router";
import { Thread } from "~/components/notes/Thread";
import { VerdictForm } from "~/components/notes/VerdictForm";
import { VerdictTag } from "~/components/ui/Tag";
import { formatFrequency, formatSwr } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";
import { searchWith } from "../sweeps.schema";

/** The chosen dip's thread: beside the chart where there is room, else right under it. */
export function DipThread({ data }: { data: SweepPageData }) {
  const { thread, project, may } = data;
  const panel = useShownWhenChosen(thread?.publicId);
  if (!thread) return null;
  const dip = data.dips.find((one) => one.publicId === thread.publicId);
  return (
    <aside ref={panel} className="thread-panel" id="thread" aria-label="Thread of the chosen dip">
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
    </aside>
  );
}

/** What is said of the sweep as a whole. */
export function SweepNotes({ data }: { data: SweepPageData }) {
  const { startHz, stopHz } = data.sweep;
  return (
    <section
      id={data.thread ? undefined : "thread"}
      aria-labelledby="sweep-thread"
      className="grid gap-3 max-w-[72ch]"
    >
      <h2 id="sweep-thread">Notes on the sweep</h2>
      <Thread
        projectId={data.project.publicId}
        place={{ sweep: data.sweep.publicId }}
        thread={data.sweepThread}
        parts={
          startHz !== null && stopHz !== null
            ? { fromHz: startHz, toHz: stopHz, picture: data.picture !== null }
            : undefined
        }
        mayWrite={data.may.write}
      />
    </section>
  );
}

/** Choosing a dip must be answered in sight: where its thread opens off the screen, it is brought there. */
function useShownWhenChosen(publicId: string | undefined) {
  const panel = useRef<HTMLElement>(null);
  const before = useRef(publicId);
  useEffect(() => {
    if (before.current === publicId) return;
    const closed = before.current;
    before.current = publicId;
    if (!publicId) {
      document
        .querySelector<HTMLElement>(`.hollow-card a[href*="dip=${closed}"]`)
        ?.focus({ preventScroll: true });
      return;
    }
    const top = panel.current?.getBoundingClientRect().top;
    if (top === undefined || (top >= 0 && top < window.innerHeight * LOW_ON_SCREEN)) return;
    const still = window.matchMedia("(prefers-reduced-motion: reduce)").matches;
    panel.current?.scrollIntoView({ block: "start", behavior: still ? "auto" : "smooth" });
  }, [publicId]);
  return panel;
}

/** A thread that begins below this share of the screen is not seen to open. */
const LOW_ON_SCREEN = 0.7;
