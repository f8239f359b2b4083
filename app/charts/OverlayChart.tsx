import type { ReactNode } from "react";
import { BandRibbon } from "./BandRibbon";
import { AXIS_HEIGHT_PX, CHART_FOOT_PX, CHART_TOP_PX } from "./ChartBase";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import type { OverlayScene, PlacedTrace } from "./overlay-scene";
import { ValueMarks, Washes } from "./PlotGround";
import { PAGE_PALETTE } from "./palette";
import { At, across, Stretched } from "./place";
import { traceStyle } from "./trace-styles";

export interface OverlayChartProps {
  scene: OverlayScene;
  label: string;
  /** The lines are named elsewhere on the page. */
  keyHidden?: boolean;
  /** The names at the lines' ends stand to the right of them: short ones, that fit the margin. */
  namesBeside?: boolean;
  /** Lies over the plot: dragging. */
  children?: ReactNode;
}

const palette = PAGE_PALETTE;

/** Several sweeps over one another; each line has its own dash and is named at its end and under the chart. */
export function OverlayChart({
  scene,
  label,
  keyHidden = false,
  namesBeside = false,
  children,
}: OverlayChartProps) {
  const footPx = scene.ribbon.length > 0 || scene.levelY === undefined ? CHART_FOOT_PX : AXIS_ONLY_PX;
  const heightPx = CHART_TOP_PX + scene.plotHeightPx + footPx;
  return (
    <div className="chart-frame">
      <div className={namesBeside ? "chart chart-named" : "chart"}>
        <div className="chart-plot" style={{ height: heightPx }}>
          <svg className="chart-layer" height={heightPx} role="img" aria-label={label}>
            <g transform={`translate(0 ${CHART_TOP_PX})`}>
              <Washes bands={scene.ribbon} heightPx={scene.plotHeightPx} />
              <ValueMarks ticks={scene.valueTicks} heightPx={scene.plotHeightPx} />
              {scene.levelY !== undefined && (
                <line x1="0" x2="100%" y1={scene.levelY} y2={scene.levelY} stroke={palette.edge} />
              )}
              <Stretched width={scene.pathWidth} height={scene.plotHeightPx} plotWidthPx={null}>
                {scene.traces.map((trace) => (
                  <TraceLine key={trace.id} trace={trace} />
                ))}
              </Stretched>
              <Links scene={scene} />
              {scene.traces.map((trace) => (
                <TraceName key={trace.id} trace={trace} beside={namesBeside} />
              ))}
              <FrequencyAxisMarks
                frequency={scene.frequency}
                y={scene.plotHeightPx}
                {...{ plotWidthPx: null, palette }}
              />
              {footPx === CHART_FOOT_PX && (
                <BandRibbon
                  bands={scene.ribbon}
                  dips={[]}
                  y={scene.plotHeightPx + AXIS_HEIGHT_PX}
                  {...{ plotWidthPx: null, palette }}
                />
              )}
            </g>
          </svg>
          {children && (
            <div className="chart-overlay" style={{ top: CHART_TOP_PX, height: scene.plotHeightPx }}>
              {children}
            </div>
          )}
        </div>
      </div>
      {!keyHidden && <TraceKey traces={scene.traces} />}
    </div>
  );
}

function TraceLine({ trace }: { trace: PlacedTrace }) {
  const { colour, dash } = traceStyle(trace.style);
  return (
    <path
      d={trace.line}
      fill="none"
      stroke={colour}
      strokeWidth="1.8"
      strokeDasharray={dash}
      strokeLinejoin="round"
      strokeLinecap={dash ? "butt" : "round"}
      vectorEffect="non-scaling-stroke"
    />
  );
}

/** A dip's way from one line to the other. */
function Links({ scene }: { scene: OverlayScene }) {
  return scene.links.map(({ id, stops }) => (
    <g key={id}>
      {stops.length === 2 && (
        <line
          x1={across(stops[0].fraction, null)}
          y1={stops[0].y}
          x2={across(stops[1].fraction, null)}
          y2={stops[1].y}
          stroke={palette.heather}
          strokeWidth="1.4"
        />
      )}
      {stops.map((stop) => (
        <circle
          key={stop.style}
          cx={across(stop.fraction, null)}
          cy={stop.y}
          r="4"
          fill={palette.paper}
          stroke={traceStyle(stop.style).colour}
          strokeWidth="2"
        />
      ))}
    </g>
  ));
}

function TraceName({ trace: { end, short, style }, beside }: { trace: PlacedTrace; beside: boolean }) {
  if (!end) return null;
  const words = short.length > 24 ? `${short.slice(0, 23)}…` : short;
  return (
    <At fraction={end.fraction} y={end.y} plotWidthPx={null}>
      <text
        x={beside ? 8 : -6}
        y={beside ? 4 : -4}
        textAnchor={beside ? "start" : "end"}
        fontFamily={palette.sansFont}
        fontSize="12"
        fill={traceStyle(style).colour}
        stroke={palette.paper}
        strokeWidth="4"
        strokeLinejoin="round"
        paintOrder="stroke"
      >
        {words}
      </text>
    </At>
  );
}

function TraceKey({ traces }: { traces: PlacedTrace[] }) {
  return (
    <ul className="flex flex-wrap gap-x-6 gap-y-1 text-small mt-1">
      {traces.map(({ id, label, style }) => (
        <li key={id} className="inline-flex items-center gap-2">
          <TraceSample style={style} />
          {label}
        </li>
      ))}
    </ul>
  );
}

/** A piece of the n-th line, beside its name. */
export function TraceSample({ style }: { style: number }) {
  const { colour, dash } = traceStyle(style);
  return (
    <svg width="44" height="8" aria-hidden="true" className="flex-none">
      <line x1="1" x2="43" y1="4" y2="4" stroke={colour} strokeWidth="2" strokeDasharray={dash} />
    </svg>
  );
}

const AXIS_ONLY_PX = 30;
