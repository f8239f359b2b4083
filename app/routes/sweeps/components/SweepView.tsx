import { useMemo } from "react";
import { useNavigate } from "react-router";
import type { ChartDip } from "~/charts/chart-types";
import { LiveSweepChart } from "~/charts/LiveSweepChart";
import type { FrequencyRange } from "~/charts/ranges";
import { unpackPoints } from "~/charts/sent-points";
import { StretchMarks } from "~/components/notes/PartMarks";
import type { SweepPageData } from "../sweep-page.server";
import { searchWith } from "../sweeps.schema";

/** The chart with its cairns and ribbon, and the cards that hang from its dips. */
export function SweepView({ data }: { data: SweepPageData }) {
  const { view, range, bands, designBands, analysis, sweep } = data;
  const navigate = useNavigate();
  const points = useMemo(() => unpackPoints(data.points), [data.points]);
  const dips = useMemo(() => data.dips.map(chartDip), [data.dips]);
  const { quantity, scale } = view;
  const chartView = useMemo(() => ({ quantity, scale, ...range }), [quantity, scale, range]);
  const [startHz, stopHz] = [sweep.startHz ?? range.fromHz, sweep.stopHz ?? range.toHz];
  const whole = useMemo(() => ({ fromHz: startHz, toHz: stopHz }), [startHz, stopHz]);
  const searchFor = ({ fromHz, toHz }: FrequencyRange) =>
    searchWith(view, {
      fromHz: fromHz > whole.fromHz ? fromHz : null,
      toHz: toHz < whole.toHz ? toHz : null,
    }) || "?";
  return (
    <LiveSweepChart
      points={points}
      limits={points.limits}
      measured={points.measured}
      dips={dips}
      bands={bands}
      designBands={designBands}
      swrLimit={view.swrLimit ?? analysis.settings.swrLimit}
      view={chartView}
      whole={whole}
      label={`Chart of ${sweep.title}`}
      dipHref={(dip) => (dip.id.startsWith("tried-") ? "#dips" : searchWith(view, { dip: dip.id }))}
      chosenDipId={view.dip}
      onPick={(id) => {
        if (!id.startsWith("tried-")) navigate(searchWith(view, { dip: id }), { preventScrollReset: true });
      }}
      rangeHref={searchFor}
      overPlot={(shownScale) => <StretchMarks scale={shownScale} />}
      onRange={(to) => navigate(searchFor(to), { replace: true, preventScrollReset: true })}
    />
  );
}

function chartDip(dip: SweepPageData["dips"][number], index: number): ChartDip {
  return {
    ...dip,
    id: dip.publicId ?? `tried-${index}`,
    verdictText: dip.verdictText || null,
    // The limits that are known: with the bench's, else from noise alone, as everywhere on the page.
    minimumSwrLow: dip.minimumSwrLow ?? dip.minimumSwrNoiseLow,
    minimumSwrHigh: dip.minimumSwrHigh ?? dip.minimumSwrNoiseHigh,
  };
}
