import { type ReactNode, useId } from "react";
import { CHART_FOOT_PX, CHART_TOP_PX, ChartBase } from "./ChartBase";
import { DipMarks, type DipMarksProps } from "./DipMarks";
import { crowdOf } from "./HollowCards";
import { PAGE_PALETTE, PAPER_PALETTE, type Palette } from "./palette";
import type { Scene } from "./scene";

export interface SweepChartProps extends Pick<DipMarksProps, "dipHref" | "chosenDipId" | "onPick"> {
  scene: Scene;
  /** What the chart is, for those who do not see it. */
  label: string;
  /** Dips whose leaders run on to cards below. */
  leaders?: ReadonlySet<string>;
  /** The overlay draws the line. */
  lineHidden?: boolean;
  /** A layer between the land and the dips, over the plot exactly. */
  children?: ReactNode;
}

/** A sweep on a page: complete without scripts, at any width. */
export function SweepChart({ scene, label, leaders, lineHidden, children, ...marks }: SweepChartProps) {
  const id = useId();
  const heightPx = CHART_TOP_PX + scene.plotHeightPx + CHART_FOOT_PX;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a chart is not a set of form fields
    <div role="group" aria-label={label} className="chart-frame">
      <div className={`chart ${leaders ? crowdOf(leaders.size) : ""}`}>
        <div className="chart-plot" style={{ height: heightPx }}>
          <svg className="chart-layer" height={heightPx} aria-hidden="true">
            <g transform={`translate(0 ${CHART_TOP_PX})`}>
              <ChartBase scene={scene} palette={PAGE_PALETTE} id={id} {...{ lineHidden, leaders }} />
            </g>
          </svg>
          {children && (
            <div className="chart-overlay" style={{ top: CHART_TOP_PX, height: scene.plotHeightPx }}>
              {children}
            </div>
          )}
          {/* biome-ignore lint/a11y/noSvgWithoutTitle: its links carry their own names */}
          <svg className="chart-layer chart-marks" height={heightPx}>
            <g transform={`translate(0 ${CHART_TOP_PX})`}>
              <DipMarks scene={scene} palette={PAGE_PALETTE} {...marks} />
            </g>
          </svg>
        </div>
      </div>
    </div>
  );
}

export interface SweepFigureProps {
  /** Built with a `plotWidthPx`. */
  scene: Scene;
  title: string;
  id: string;
  palette?: Palette;
}

const FIGURE_LEFT_PX = 60;
const FIGURE_RIGHT_PX = 24;

/** The same drawing as one SVG picture of a fixed size, with its colours written out. */
export function SweepFigure({ scene, title, id, palette = PAPER_PALETTE }: SweepFigureProps) {
  const width = FIGURE_LEFT_PX + (scene.plotWidthPx ?? scene.pathWidth) + FIGURE_RIGHT_PX;
  const height = CHART_TOP_PX + scene.plotHeightPx + CHART_FOOT_PX;
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
    >
      <title>{title}</title>
      <rect width={width} height={height} fill={palette.paper} />
      <g transform={`translate(${FIGURE_LEFT_PX} ${CHART_TOP_PX})`}>
        <ChartBase scene={scene} palette={palette} id={id} />
        <DipMarks scene={scene} palette={palette} />
      </g>
    </svg>
  );
}
