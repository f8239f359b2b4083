import { type FrequencyScale, frequencyAxis } from "./axis";
import { CHART_TOP_PX } from "./ChartBase";
import { differencePath, differenceTicks } from "./difference-path";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import { ValueMarks } from "./PlotGround";
import { PAGE_PALETTE } from "./palette";
import { across, Stretched } from "./place";

export interface DifferenceChartProps {
  /** Hz, ascending, and dB; NaN is a gap. */
  frequencyHz: ArrayLike<number>;
  db: ArrayLike<number>;
  scale: FrequencyScale;
  label: string;
}

const PATH_WIDTH = 1000;
const HEIGHT_PX = 110;
const AXIS_PX = 34;
const palette = PAGE_PALETTE;

/** What the later sweep has more in return loss, over the earlier one's level line. */
export function DifferenceChart({ frequencyHz, db, scale, label }: DifferenceChartProps) {
  const { ticks, yOf } = differenceTicks(db, HEIGHT_PX);
  const path = differencePath(frequencyHz, db, scale, PATH_WIDTH, yOf);
  const zero = yOf(0);
  return (
    <div className="chart-frame">
      <div className="chart">
        <div className="chart-plot" style={{ height: CHART_TOP_PX + HEIGHT_PX + AXIS_PX }}>
          <svg
            className="chart-layer"
            height={CHART_TOP_PX + HEIGHT_PX + AXIS_PX}
            role="img"
            aria-label={label}
          >
            <g transform={`translate(0 ${CHART_TOP_PX})`}>
              <ValueMarks ticks={ticks} heightPx={HEIGHT_PX} />
              <Stretched width={PATH_WIDTH} height={HEIGHT_PX} plotWidthPx={null}>
                <path d={path.area} fill={palette.water} />
                <path
                  d={path.line}
                  fill="none"
                  stroke={palette.ink}
                  strokeWidth="1.4"
                  strokeLinejoin="round"
                  vectorEffect="non-scaling-stroke"
                />
              </Stretched>
              <line x1="0" x2={across(1, null)} y1={zero} y2={zero} stroke={palette.edge} />
              <FrequencyAxisMarks
                frequency={frequencyAxis(scale)}
                y={HEIGHT_PX}
                {...{ plotWidthPx: null, palette }}
              />
            </g>
          </svg>
        </div>
      </div>
    </div>
  );
}
