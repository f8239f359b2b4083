import { useMemo } from "react";
import { Link } from "react-router";
import type { ChartDip } from "~/charts/chart-types";
import { SweepChart } from "~/charts/SweepChart";
import { buildSweepScene } from "~/charts/scene";
import { Tag } from "~/components/ui/Tag";
import { formatFrequency, formatSwr } from "~/measurement/units";
import type { Example } from "../example.server.ts";

/** A sweep of a public project as its own page draws it, each cairn leading to its dip. */
export function ExampleSweep({ example }: { example: Example }) {
  const { project, sweep, points, designBands, bands, fromHz, toHz, swrLimit } = example;
  const page = `/projects/${project.publicId}/sweeps/${sweep.publicId}`;
  const dips = useMemo(
    () =>
      example.dips.map(
        (dip): ChartDip => ({ ...dip, id: dip.publicId ?? "", verdictText: dip.verdictText || null }),
      ),
    [example.dips],
  );
  const scene = useMemo(
    () =>
      buildSweepScene({
        points,
        dips,
        bands,
        designBands,
        view: { quantity: "rl", scale: "linear", fromHz, toHz },
        swrLimit,
        plotHeightPx: 260,
      }),
    [points, dips, bands, designBands, fromHz, toHz, swrLimit],
  );
  const deepest = [...dips].sort((a, b) => a.minimumSwr - b.minimumSwr)[0];
  return (
    <section aria-labelledby="example" className="space-y-3">
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h2 id="example">
          <Link to={page}>{sweep.title}</Link>
        </h2>
        <p className="soft">
          from <Link to={`/projects/${project.publicId}`}>{project.title}</Link>
        </p>
        {project.demo && <Tag tone="clay">invented data</Tag>}
      </div>
      <SweepChart
        scene={scene}
        label={`Chart of ${sweep.title}`}
        dipHref={(dip) => `/projects/${project.publicId}/dips/${dip.id}`}
      />
      {deepest && (
        <p className="soft">
          {dips.length === 1 ? "One dip" : `${dips.length} dips`}; the deepest at{" "}
          <span className="number">
            {formatFrequency(deepest.frequencyHz, deepest.frequencyUncertaintyHz)}
          </span>
          , lowest SWR <span className="number">{formatSwr(deepest.minimumSwr)}</span>. Each cairn leads to
          its dip, its numbers and what was said about it.
        </p>
      )}
    </section>
  );
}
