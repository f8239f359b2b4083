import { renderToStaticMarkup } from "react-dom/server";
import { PAGE_PALETTE } from "~/charts/palette";
import { SweepFigure } from "~/charts/SweepChart";
import { buildSweepScene, type SceneInput } from "~/charts/scene";
import type { DesignBand } from "~/db/projects.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import type { ShownDip } from "../shown-dips.server.ts";
import { limitsOf, type SweepAt, uncorrected } from "../shown-sweep.server.ts";
import { FIGURE_ID } from "./frozen.ts";

export interface Drawable {
  at: SweepAt;
  dips: readonly ShownDip[];
  designBands: readonly DesignBand[];
  ituRegion: number | null;
  range: { fromHz: number; toHz: number };
  swrLimit?: number;
  title: string;
}

/** Return loss over a stretch, for wide and narrow pages, in the page's own colours. What was said of its dips is left out. */
export function drawStretch({ at, dips, range, designBands, title, ...more }: Drawable) {
  const input: Omit<SceneInput, "plotWidthPx" | "plotHeightPx"> = {
    points: at.sweep,
    limits: limitsOf(at.sweep),
    measured: uncorrected(at),
    dips: dips.map((dip, i) => ({
      ...dip,
      id: dip.publicId ?? String(i),
      noteCount: 0,
      latestNote: null,
      verdictText: null,
    })),
    bands: bandsOverlapping((more.ituRegion as ItuRegion | null) ?? null, range.fromHz, range.toHz),
    designBands,
    view: { quantity: "rl", scale: scaleOf(range), ...range },
    swrLimit: more.swrLimit ?? DEFAULT_SETTINGS.swrLimit,
  };
  const draw = (size: typeof WIDE) => {
    const scene = buildSweepScene({ ...input, ...size });
    const figure = <SweepFigure scene={scene} title={title} id={FIGURE_ID} palette={PAGE_PALETTE} />;
    return renderToStaticMarkup(figure);
  };
  return { wide: draw(WIDE), narrow: draw(NARROW) };
}

/** As on a sweep's page: many octaves are shown by their ratio. */
function scaleOf({ fromHz, toHz }: { fromHz: number; toHz: number }): "linear" | "log" {
  return fromHz > 0 && toHz / fromHz > LOG_FROM_RATIO ? "log" : "linear";
}

/** Plots; the axis and the margins come on top: 644 and 324 px. */
const WIDE = { plotWidthPx: 560, plotHeightPx: 220 };
const NARROW = { plotWidthPx: 240, plotHeightPx: 180 };
/** Beyond some four octaves the low end can't be read on a linear axis. */
const LOG_FROM_RATIO = 16;
