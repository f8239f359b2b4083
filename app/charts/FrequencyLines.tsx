import { useMemo } from "react";
import { type FrequencyScale, frequencyAxis } from "./axis";
import { AXIS_HEIGHT_PX, CHART_TOP_PX } from "./ChartBase";
import { decimate } from "./decimate";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import { PAGE_PALETTE, type Palette } from "./palette";
import { profilePaths } from "./paths";
import { across, round, Stretched } from "./place";
import type { ValueTick } from "./value-axis";

export interface FrequencyLine {
  name: string;
  /** One a frequency; NaN is a gap. */
  values: ArrayLike<number>;
  colour: keyof Pick<Palette, "ink" | "heather" | "fen" | "clay">;
  dash?: string;
}

export interface FrequencyLinesProps {
  frequencyHz: ArrayLike<number>;
  lines: readonly FrequencyLine[];
  scale: FrequencyScale;
  heightPx: number;
  yOf: (value: number) => number;
  ticks: readonly ValueTick[];
  /** Frequencies that are marked by an upright line, Hz. */
  marksHz?: readonly number[];
  /** What the chart is, for those who do not see it; its numbers stand in the table. */
  label: string;
}

const COLUMNS = 480;
const WIDTH = 960;
const palette = PAGE_PALETTE;

/** Lines of any quantity over frequency, each with its own colour and dash. Complete without scripts, at any width. */
export function FrequencyLines(props: FrequencyLinesProps) {
  const { frequencyHz, lines, scale, heightPx, yOf, ticks, marksHz = [], label } = props;
  const drawn = useMemo(
    () =>
      lines.map((line) => {
        const runs = decimate({ frequencyHz, magnitude: line.values }, scale, COLUMNS);
        const paths = profilePaths(runs, { width: WIDTH, heightPx, yOfMagnitude: yOf });
        return { ...line, within: paths.line, offScale: paths.offScale };
      }),
    [frequencyHz, lines, scale, heightPx, yOf],
  );
  const axis = useMemo(() => frequencyAxis(scale), [scale]);
  const height = CHART_TOP_PX + heightPx + AXIS_HEIGHT_PX;
  return (
    <figure className="chart-frame">
      <figcaption className="line-keys">
        {lines.map((line) => (
          <span key={line.name}>
            <Key line={line} />
            {line.name}
          </span>
        ))}
      </figcaption>
      <div className="chart">
        <div className="chart-plot" style={{ height }}>
          <svg className="chart-layer" height={height} role="img" aria-label={label}>
            <g transform={`translate(0 ${CHART_TOP_PX})`}>
              <rect width={across(1, null)} height={heightPx} fill={palette.land} />
              {ticks.map((tick) => (
                <g key={tick.label}>
                  <line
                    x1="0"
                    x2={across(1, null)}
                    y1={round(tick.y, 1)}
                    y2={round(tick.y, 1)}
                    stroke={palette.edge}
                    strokeDasharray="1 4"
                  />
                  <text
                    x="-8"
                    y={round(tick.y, 1) + 4}
                    textAnchor="end"
                    fontFamily={palette.monoFont}
                    fontSize="11.5"
                    fill={palette.soft}
                  >
                    {tick.label}
                  </text>
                </g>
              ))}
              {marksHz.map((hz) => (
                <line
                  key={hz}
                  x1={across(scale.fractionOf(hz), null)}
                  x2={across(scale.fractionOf(hz), null)}
                  y1="0"
                  y2={heightPx}
                  stroke={palette.heather}
                  strokeDasharray="2 2"
                />
              ))}
              <Stretched width={WIDTH} height={heightPx} plotWidthPx={null}>
                {drawn.map(({ name, colour, dash, within, offScale }) => (
                  <g key={name} fill="none" strokeLinejoin="round" strokeLinecap="round">
                    <path
                      d={within || "M0 0"}
                      stroke={palette[colour]}
                      strokeWidth="1.7"
                      strokeDasharray={dash}
                      vectorEffect="non-scaling-stroke"
                    />
                    {offScale && (
                      <path
                        d={offScale}
                        stroke={palette.clay}
                        strokeWidth="1.7"
                        strokeDasharray="3 4"
                        vectorEffect="non-scaling-stroke"
                      />
                    )}
                  </g>
                ))}
              </Stretched>
              <line
                x1="0"
                x2={across(1, null)}
                y1={heightPx}
                y2={heightPx}
                stroke={palette.ink}
                strokeWidth="1.25"
              />
              <FrequencyAxisMarks frequency={axis} y={heightPx} plotWidthPx={null} palette={palette} />
            </g>
          </svg>
        </div>
      </div>
    </figure>
  );
}

function Key({ line }: { line: FrequencyLine }) {
  return (
    <svg width="28" height="8" aria-hidden="true">
      <path d="M1 4H27" stroke={palette[line.colour]} strokeWidth="2" strokeDasharray={line.dash} />
    </svg>
  );
}
