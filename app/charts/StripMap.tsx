import type { CSSProperties, ReactNode } from "react";
import { AxisUnit } from "./AxisUnit";
import { BandRibbon } from "./BandRibbon";
import { AXIS_HEIGHT_PX, CHART_FOOT_PX } from "./ChartBase";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import { PAGE_PALETTE } from "./palette";
import { across } from "./place";
import { StripGhosts } from "./StripGhosts";
import { StripLand } from "./StripLand";
import { StripTrail } from "./StripTrail";
import { type StripHrefs, StripWords } from "./StripWords";
import type { StripScene } from "./strip-scene";

export interface StripMapProps extends StripHrefs {
  scene: StripScene;
  label: string;
  trailHref: (trailId: string) => string;
  dipHref: (dipId: string) => string;
  /** The trail whose numbers stand beside its stops. */
  activeTrail?: string | null;
  onActive?: (trailId: string | null) => void;
  /** Lies over the map, under its links: dragging. */
  children?: ReactNode;
}

const TOP_PX = 10;
/** What fits on a sheet. */
const SHEET_PX = 760;
const palette = PAGE_PALETTE;

/** The project's story at a glance: what moved, what did not, what appeared. */
export function StripMap(props: StripMapProps) {
  const { scene, label, activeTrail = null, onActive, children } = props;
  const { stripHref, stepHref, trailHref, dipHref } = props;
  const heightPx = TOP_PX + scene.heightPx + CHART_FOOT_PX;
  const print = { "--print-zoom": Math.min(1, SHEET_PX / heightPx).toFixed(3) } as CSSProperties;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing is not a set of form fields
    <div role="group" aria-label={label} className="chart-frame">
      <div className="chart strip-map" style={print}>
        <div className="chart-plot" style={{ height: heightPx }}>
          <svg className="chart-layer" height={heightPx} aria-hidden="true">
            <g transform={`translate(0 ${TOP_PX})`}>
              <Washes scene={scene} />
              {scene.strips.map((placed) => (
                <StripLand key={placed.id} placed={placed} />
              ))}
              <line x1="0" x2="100%" y1={scene.heightPx} y2={scene.heightPx} stroke={palette.ink} />
              <FrequencyAxisMarks
                frequency={scene.frequency}
                y={scene.heightPx}
                {...{ plotWidthPx: null, palette }}
              />
              <AxisUnit
                y={scene.heightPx + CHART_FOOT_PX - 2}
                text={scene.frequency.caption.replace(" log", ", logarithmic")}
              />
              <BandRibbon
                bands={scene.ribbon}
                dips={[]}
                y={scene.heightPx + AXIS_HEIGHT_PX}
                {...{ plotWidthPx: null, palette }}
              />
            </g>
          </svg>
          {children && (
            <div className="strip-map-ground" style={{ top: TOP_PX, height: scene.heightPx }}>
              {children}
            </div>
          )}
          {scene.trails.length > 0 && (
            // biome-ignore lint/a11y/noSvgWithoutTitle: its links carry their own names
            <svg className="chart-layer chart-marks strip-trails" height={heightPx}>
              <g transform={`translate(0 ${TOP_PX})`}>
                {scene.trails.map((placed) => (
                  <StripTrail
                    key={placed.id}
                    placed={placed}
                    heightPx={scene.heightPx}
                    active={placed.id === activeTrail}
                    {...{ onActive, trailHref, dipHref }}
                  />
                ))}
                <StripGhosts trails={scene.trails} />
              </g>
            </svg>
          )}
          <StripWords topPx={TOP_PX} {...{ scene, stripHref, stepHref }} />
        </div>
      </div>
    </div>
  );
}

function Washes({ scene }: { scene: StripScene }) {
  return scene.ribbon
    .filter((band) => band.design)
    .map((band) => (
      <rect
        key={`${band.name} ${band.fraction}`}
        x={across(band.fraction, null)}
        y={-TOP_PX}
        width={across(Math.max(band.widthFraction, 0.0016), null)}
        height={scene.heightPx + TOP_PX + AXIS_HEIGHT_PX}
        fill={palette.wash}
      />
    ));
}
