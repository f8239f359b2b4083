import { BandRibbon } from "./BandRibbon";
import { AXIS_HEIGHT_PX, CHART_FOOT_PX } from "./ChartBase";
import { FrequencyAxisMarks } from "./FrequencyAxisMarks";
import { PAGE_PALETTE } from "./palette";
import { across, Stretched } from "./place";
import { StripTrail } from "./StripTrail";
import type { PlacedStrip, Strip, StripScene, Trail } from "./strip-scene";

export interface StripMapProps {
  scene: StripScene;
  label: string;
  stripHref: (strip: Strip) => string;
  trailHref?: (trail: Trail) => string;
}

const TOP_PX = 8;
const palette = PAGE_PALETTE;

/** The project's story at a glance: what moved, what did not, what appeared. */
export function StripMap({ scene, label, stripHref, trailHref }: StripMapProps) {
  const heightPx = TOP_PX + scene.heightPx + CHART_FOOT_PX;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing is not a set of form fields
    <div role="group" aria-label={label} className="chart-frame">
      <div className="chart strip-map">
        <div className="chart-plot" style={{ height: heightPx }}>
          <svg className="chart-layer" height={heightPx} aria-hidden="true">
            <g transform={`translate(0 ${TOP_PX})`}>
              <Washes scene={scene} />
              {scene.strips.map((placed) => (
                <StripLand key={placed.strip.id} placed={placed} width={scene.pathWidth} />
              ))}
              <FrequencyAxisMarks
                frequency={scene.frequency}
                y={scene.heightPx}
                {...{ plotWidthPx: null, palette }}
              />
              <BandRibbon
                bands={scene.ribbon}
                dips={[]}
                y={scene.heightPx + AXIS_HEIGHT_PX}
                {...{ plotWidthPx: null, palette }}
              />
            </g>
          </svg>
          {scene.trails.length > 0 && (
            // biome-ignore lint/a11y/noSvgWithoutTitle: its links carry their own names
            <svg className="chart-layer chart-marks" height={heightPx}>
              <g transform={`translate(0 ${TOP_PX})`}>
                {scene.trails.map((placed) => (
                  <StripTrail
                    key={placed.trail.id}
                    placed={placed}
                    scene={scene}
                    href={trailHref?.(placed.trail)}
                  />
                ))}
              </g>
            </svg>
          )}
          <ol className="strip-map-words" style={{ top: TOP_PX }}>
            {scene.strips.map(({ strip, captionY, stepY }) => (
              <li key={strip.id}>
                <p className="strip-caption" style={{ top: captionY }}>
                  <a href={stripHref(strip)}>{strip.title}</a>{" "}
                  <span className="number soft">{strip.caption}</span>
                </p>
                {stepY !== null && (
                  <p className="strip-step" style={{ top: stepY }}>
                    {strip.step}
                  </p>
                )}
              </li>
            ))}
          </ol>
        </div>
      </div>
    </div>
  );
}

function StripLand({ placed, width }: { placed: PlacedStrip; width: number }) {
  const { landY, footY } = placed;
  return (
    <g>
      <Stretched width={width} height={footY - landY} plotWidthPx={null} y={landY}>
        <path d={placed.land} fill={palette.land} />
        <path
          d={placed.line}
          fill="none"
          stroke={palette.ink}
          strokeWidth="1.4"
          strokeLinejoin="round"
          strokeLinecap="round"
          vectorEffect="non-scaling-stroke"
        />
      </Stretched>
      <line x1="0" x2="100%" y1={footY} y2={footY} stroke={palette.edge} />
      {placed.dips.map((dip) => (
        <circle key={dip.id} cx={across(dip.fraction, null)} cy={dip.y} r="2.5" fill={palette.heather} />
      ))}
    </g>
  );
}

function Washes({ scene }: { scene: StripScene }) {
  return scene.ribbon
    .filter((band) => band.design)
    .map((band) => (
      <rect
        key={`${band.name} ${band.fraction}`}
        x={across(band.fraction, null)}
        y="0"
        width={across(Math.max(band.widthFraction, 0.001), null)}
        height={scene.heightPx}
        fill={palette.wash}
      />
    ));
}
