import { useMemo } from "react";
import { Link } from "react-router";
import { frequencyScale } from "~/charts/axis";
import { DifferenceChart } from "~/charts/DifferenceChart";
import { OverlayChart } from "~/charts/OverlayChart";
import { buildOverlayScene } from "~/charts/overlay-scene";
import { unpackPoints } from "~/charts/sent-points";
import { EmptyState } from "~/components/ui/EmptyState";
import type { StepPageData } from "../step-page.server";

/** The sweeps before and after over one another, and under them what the later one has more. */
export function Effect({ data }: { data: StepPageData }) {
  const { effect, range, step, log } = data;
  const { before, after, difference } = effect;
  const scene = useSceneOf(data);
  if (!scene || !range) {
    return (
      <EmptyState drawing="sweeps" title="No sweep beside this step yet">
        With one from before and one from after, what it did can be seen.
      </EmptyState>
    );
  }
  const scale = frequencyScale(log ? "log" : "linear", range.fromHz, range.toHz);
  return (
    <section aria-labelledby="effect" className="grid gap-4 min-w-0">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h3 id="effect">{step.state === "planned" ? "As it is before" : "What it did"}</h3>
        <View data={data} />
      </div>
      {step.state === "done" && !after && (
        <p>No sweep was taken after it yet: take one, and what it did shows here.</p>
      )}
      {step.state === "done" && !before && <p>No sweep was taken before it: what it did can't be told.</p>}
      <OverlayChart
        scene={scene}
        label={`Return loss ${before ? `before, ${before.title}` : ""}${before && after ? ", and " : ""}${after ? `after, ${after.title}` : ""}. The numbers are in the table below.`}
      />
      {before && after && before.plane !== after.plane && (
        <p className="text-small text-clay max-w-[72ch]">
          The two are not at one plane: before {before.plane}, after {after.plane}. The difference holds that
          too.
        </p>
      )}
      {difference && difference.frequencyHz.length > 1 && (
        <div className="grid gap-1">
          <h4 className="text-small font-semibold">Return loss, after less before</h4>
          <DifferenceChart
            frequencyHz={difference.frequencyHz}
            db={difference.db}
            scale={scale}
            label={rangeWords(difference.db)}
          />
          <p className="text-small soft">
            {rangeWords(difference.db)} Above the line less comes back than before.
          </p>
        </div>
      )}
      {before && after && difference?.frequencyHz.length === 0 && (
        <p className="text-small text-clay">
          The two sweeps have no frequency in common: no difference can be had.
        </p>
      )}
    </section>
  );
}

function View({ data }: { data: StepPageData }) {
  const { log, zoomed, range, effect, project } = data;
  const { before, after } = effect;
  const stretch = zoomed && range ? `&from=${megahertz(range.fromHz)}&to=${megahertz(range.toHz)}` : "";
  return (
    <div className="flex flex-wrap items-center gap-3 no-print">
      {before && after && (
        <Link
          to={`/projects/${project.publicId}/compare?sweep=${before.publicId}&sweep=${after.publicId}`}
          className="text-small"
        >
          Compare with others
        </Link>
      )}
      {zoomed && (
        <Link to={log ? "?axis=log" : "?"} preventScrollReset className="text-small">
          The whole range
        </Link>
      )}
      <nav className="choice" aria-label="Frequency axis">
        <Link to={`?axis=linear${stretch}`} aria-current={!log} preventScrollReset>
          Linear
        </Link>
        <Link to={`?axis=log${stretch}`} aria-current={log} preventScrollReset>
          Logarithmic
        </Link>
      </nav>
    </div>
  );
}

function useSceneOf({ effect, range, log, bands, designBands }: StepPageData) {
  const { before, after, movements } = effect;
  return useMemo(() => {
    if (!range) return null;
    const sides = [
      { id: "before", word: "before", side: before },
      { id: "after", word: "after", side: after },
    ];
    return buildOverlayScene({
      traces: sides.flatMap(({ id, word, side }) =>
        side ? [{ id, label: `${word}: ${side.title}`, short: word, points: unpackPoints(side.points) }] : [],
      ),
      links: movements.map((move, i) => ({
        id: String(i),
        stops: [
          ...(move.before ? [{ traceId: "before", ...move.before }] : []),
          ...(move.after ? [{ traceId: "after", ...move.after }] : []),
        ],
      })),
      bands,
      designBands,
      view: { quantity: "rl", scale: log ? "log" : "linear", ...range },
    });
  }, [before, after, movements, range, log, bands, designBands]);
}

function rangeWords(db: readonly number[]): string {
  const known = db.filter((value) => Number.isFinite(value));
  const [least, most] = [Math.min(...known), Math.max(...known)];
  return `Between ${signed(least)} and ${signed(most)} dB.`;
}

function signed(db: number): string {
  return `${db < 0 ? "−" : "+"}${Math.abs(db).toFixed(1)}`;
}

function megahertz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}
