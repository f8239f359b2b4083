import { useMemo } from "react";
import { useNavigate } from "react-router";
import type { ChartDip } from "~/charts/chart-types";
import { dipsWithCards, HollowCards } from "~/charts/HollowCards";
import { SweepChart } from "~/charts/SweepChart";
import { buildSweepScene } from "~/charts/scene";
import type { SweepPageData } from "../sweep";
import { searchWith } from "../sweeps.schema";

/** The chart with its cairns and ribbon, and the cards that hang from its dips. */
export function SweepView({ data }: { data: SweepPageData }) {
  const { view, points, range, bands, designBands, analysis, sweep } = data;
  const navigate = useNavigate();
  const dips = useMemo(() => data.dips.map(chartDip), [data.dips]);
  const swrLimit = view.swrLimit ?? analysis.settings.swrLimit;
  const scene = useMemo(
    () =>
      buildSweepScene({
        points,
        dips,
        bands,
        designBands,
        view: { quantity: view.quantity, scale: view.scale, ...range },
        swrLimit,
      }),
    [points, dips, bands, designBands, view.quantity, view.scale, range, swrLimit],
  );
  const dipHref = (dip: ChartDip) => searchWith(view, { dip: dip.id });
  const onPick = (id: string) => navigate(searchWith(view, { dip: id }), { preventScrollReset: true });
  const links = { dipHref, chosenDipId: view.dip, onPick };
  return (
    <div className="grid min-w-0">
      <SweepChart scene={scene} label={`Chart of ${sweep.title}`} leaders={dipsWithCards(scene)} {...links} />
      <HollowCards scene={scene} designBands={designBands} {...links} />
    </div>
  );
}

function chartDip(dip: SweepPageData["dips"][number], index: number): ChartDip {
  return { ...dip, id: dip.publicId ?? `tried-${index}`, verdictText: dip.verdictText || null };
}
