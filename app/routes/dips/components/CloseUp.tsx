import { useMemo } from "react";
import { Link } from "react-router";
import { SweepChart } from "~/charts/SweepChart";
import { buildSweepScene } from "~/charts/scene";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { formatFrequency } from "~/measurement/units";
import type { DipPageData } from "../dip-page.server";

/** The curve around the dip, near enough to see its shape. */
export function CloseUp({ data }: { data: DipPageData }) {
  const { closeUp, shown, bands, designBands, provenance, dip, sweep, projectId } = data;
  const { range, points } = closeUp;
  const swrLimit = provenance.settings?.swrLimit ?? DEFAULT_SETTINGS.swrLimit;
  const scene = useMemo(
    () =>
      buildSweepScene({
        points,
        limits: points.limits,
        dips: shown.map((one, i) => ({
          ...one,
          id: one.publicId ?? String(i),
          verdictText: one.verdictText || null,
        })),
        bands,
        designBands,
        view: { quantity: "rl", scale: "linear", ...range },
        swrLimit,
        plotHeightPx: 220,
      }),
    [points, shown, bands, designBands, range, swrLimit],
  );
  const search = `?dip=${dip.publicId}&from=${megahertz(range.fromHz)}&to=${megahertz(range.toHz)}`;
  if (points.frequencyHz.length === 0) {
    return <p className="soft">The curve can't be drawn: the sweep's file is not read at the moment.</p>;
  }
  return (
    <figure className="grid gap-2 min-w-0">
      <SweepChart
        scene={scene}
        label={`Return loss around the dip, ${formatFrequency(range.fromHz)} to ${formatFrequency(range.toHz)}`}
        chosenDipId={dip.publicId}
        dipHref={(one) => `/projects/${projectId}/dips/${one.id}`}
      />
      <figcaption className="text-small soft">
        Return loss around the dip.{" "}
        <Link to={`/projects/${projectId}/sweeps/${sweep.publicId}${search}`}>
          See this stretch in the whole sweep
        </Link>
      </figcaption>
    </figure>
  );
}

function megahertz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}
