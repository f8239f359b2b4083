import { useMemo } from "react";
import { SweepChart } from "~/charts/SweepChart";
import { buildSweepScene } from "~/charts/scene";
import { unpackPoints } from "~/charts/sent-points";
import type { RepeatsData } from "../../repeats-page.server";

type Mean = NonNullable<NonNullable<RepeatsData["findings"]>["mean"]>;

/** The mean of repeats with a band of their spread. */
export function MeanChart({ mean }: { mean: Mean }) {
  const points = useMemo(() => unpackPoints(mean.points), [mean.points]);
  const scene = useMemo(() => {
    const hz = points.frequencyHz;
    return buildSweepScene({
      points,
      limits: points.limits,
      dips: mean.dips.map((dip, i) => ({
        ...dip,
        id: `mean-${i}`,
        noteCount: 0,
        verdict: "open" as const,
        verdictText: null,
        latestNote: null,
        inDesignBand: null,
      })),
      bands: [],
      designBands: [],
      view: { quantity: "rl", scale: "linear", fromHz: hz[0], toHz: hz[hz.length - 1] },
      swrLimit: mean.swrLimit,
      plotHeightPx: 260,
    });
  }, [points, mean]);
  return <SweepChart scene={scene} label="Mean of the repeats" dipHref={() => "#repeated-dips"} />;
}
