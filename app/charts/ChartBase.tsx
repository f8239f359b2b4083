import { BandRibbon } from "./BandRibbon";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import { LandLayer } from "./LandLayer";
import type { Palette } from "./palette";
import { across } from "./place";
import type { Scene } from "./scene";

/** Room over the plot, and under it for the axis and the ribbon. */
export const CHART_TOP_PX = 10;
export const AXIS_HEIGHT_PX = 24;
export const CHART_FOOT_PX = 64;

export interface ChartBaseProps {
  scene: Scene;
  palette: Palette;
  /** Makes the ids inside unique on a page. */
  id: string;
  /** Leave the line to another layer on top. */
  lineHidden?: boolean;
  /** Draw the leaders down from the cairns. */
  leaders?: ReadonlySet<string>;
}

/** Everything of a chart but its dips: land, strata, water, axes, ribbon. Its origin is the plot's top left. */
export function ChartBase({ scene, palette, id, lineHidden = false, leaders }: ChartBaseProps) {
  const { plotHeightPx: height, plotWidthPx } = scene;
  const right = across(1, plotWidthPx);
  return (
    <g>
      <LandLayer {...{ scene, palette, id, lineHidden }} />
      <line x1="0" x2={right} y1={height} y2={height} stroke={palette.ink} strokeWidth="1.25" />
      <ValueLabels scene={scene} palette={palette} />
      <g className="leaders">
        {scene.dips
          .filter((dip) => leaders?.has(dip.id))
          .map(({ id: key, fraction, cairnY }) => (
            <line
              key={key}
              x1={across(fraction, plotWidthPx)}
              x2={across(fraction, plotWidthPx)}
              y1={cairnY + 4}
              y2={height + CHART_FOOT_PX}
              stroke={palette.heather}
            />
          ))}
      </g>
      <FrequencyAxisMarks frequency={scene.frequency} y={height} {...{ plotWidthPx, palette }} />
      <BandRibbon
        bands={scene.ribbon}
        dips={scene.dips}
        y={height + AXIS_HEIGHT_PX}
        plotWidthPx={plotWidthPx}
        palette={palette}
      />
    </g>
  );
}

function ValueLabels({ scene, palette }: { scene: Scene; palette: Palette }) {
  const { limit } = scene;
  return (
    <g fontFamily={palette.monoFont} fontSize="11.5" textAnchor="end">
      {scene.valueTicks
        .filter((tick) => !limit || Math.abs(tick.y - limit.y) > 11)
        .map((tick) => (
          <text key={tick.label} x="-8" y={tick.y + 4} fill={palette.soft}>
            {tick.label}
          </text>
        ))}
      {limit && (
        <text x="-8" y={limit.y + 4} fill={palette.moss}>
          {limit.label}
        </text>
      )}
    </g>
  );
}
