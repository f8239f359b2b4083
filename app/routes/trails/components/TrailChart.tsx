import { AxisUnit } from "~/charts/AxisUnit";
import { frequencyAxis, frequencyScale } from "~/charts/axis";
import { FrequencyAxisMarks } from "~/charts/FrequencyAxisMarks";
import { PAGE_PALETTE } from "~/charts/palette";
import { across, Stretched } from "~/charts/place";
import { formatDateShort } from "~/services/dates";
import type { TrailPageData } from "../trail-page.server";

const ROW_PX = 34;
const UNITS = 1000;
/** Around all that is drawn, of its span; and the least of the frequency. */
const MARGIN_SHARE = 0.15;
const LEAST_SHARE = 0.004;
const palette = PAGE_PALETTE;

/** Where the dip stood in each sweep, newest on top, with its limits, and where steps were to put it. */
export function TrailChart({ data }: { data: TrailPageData }) {
  const { stops, designBands, expected, project } = data;
  const planned = expected.filter(({ step }) => step.planned);
  const rows = [...stops].reverse();
  const scale = scaleOf(data);
  const axis = frequencyAxis(scale);
  const top = planned.length > 0 ? ROW_PX : 0;
  const heightPx = top + rows.length * ROW_PX;
  const yOf = (row: number) => top + (row + 0.5) * ROW_PX;
  const path = rows.map(
    (stop, row) => `${(scale.fractionOf(stop.frequencyHz) * UNITS).toFixed(1)} ${yOf(row)}`,
  );
  return (
    <figure className="chart-frame">
      <figcaption className="sr-only">
        Frequency of the trail in each sweep; the table below has the numbers.
      </figcaption>
      <div className="chart trail-chart">
        <div className="chart-plot" style={{ height: heightPx + AXIS_PX }}>
          <svg className="chart-layer" height={heightPx + AXIS_PX} aria-hidden="true">
            {designBands.map((band) => {
              const [from, to] = [scale.fractionOf(band.lowHz), scale.fractionOf(band.highHz)].map(inside);
              if (!(to > from)) return null;
              return (
                <rect
                  key={band.name}
                  x={across(from, null)}
                  width={across(to - from, null)}
                  y="0"
                  height={heightPx}
                  fill={palette.wash}
                />
              );
            })}
            {rows.map((stop, row) => (
              <line
                key={stop.publicId}
                x1="0"
                x2="100%"
                y1={top + (row + 1) * ROW_PX}
                y2={top + (row + 1) * ROW_PX}
                stroke={palette.rule}
              />
            ))}
            <Stretched width={UNITS} height={heightPx} plotWidthPx={null}>
              <path
                d={`M${path.join("L")}`}
                fill="none"
                stroke={palette.heather}
                strokeWidth="1.75"
                vectorEffect="non-scaling-stroke"
              />
            </Stretched>
            {rows.map((stop, row) => (
              <Mark
                key={stop.publicId}
                y={yOf(row)}
                half={stop.uncertaintyHz}
                hz={stop.frequencyHz}
                scale={scale}
              />
            ))}
            {planned.map((place) => (
              <g key={place.step.publicId} stroke={palette.heather} fill="none" strokeWidth="1.5">
                {place.lowHz !== null && place.highHz !== null && (
                  <line
                    x1={across(inside(scale.fractionOf(place.lowHz)), null)}
                    x2={across(inside(scale.fractionOf(place.highHz)), null)}
                    y1={ROW_PX / 2}
                    y2={ROW_PX / 2}
                  />
                )}
                <circle
                  cx={across(inside(scale.fractionOf(place.frequencyHz)), null)}
                  cy={ROW_PX / 2}
                  r="5.5"
                  fill={palette.paper}
                  strokeDasharray="2.6 2"
                />
              </g>
            ))}
            <line x1="0" x2="100%" y1={heightPx} y2={heightPx} stroke={palette.ink} />
            <FrequencyAxisMarks frequency={axis} y={heightPx} {...{ plotWidthPx: null, palette }} />
            <AxisUnit y={heightPx + 34} text={axis.caption} />
          </svg>
          <ol className="strip-map-words">
            {planned.length > 0 && (
              <li className="strip-steps strip-planned" style={{ top: 0, height: ROW_PX }}>
                <span className="number">planned</span> {planned.map(({ step }) => step.title).join("; ")}
              </li>
            )}
            {rows.map((stop, row) => (
              <li
                key={stop.publicId}
                className="trail-row"
                style={{ top: yOf(row) - ROW_PX / 2, height: ROW_PX }}
              >
                <span className="number">
                  {stop.sweep.takenAt ? formatDateShort(stop.sweep.takenAt) : "no date"}
                </span>{" "}
                <a href={`/projects/${project.publicId}/dips/${stop.publicId}`}>{stop.sweep.title}</a>
              </li>
            ))}
          </ol>
        </div>
      </div>
    </figure>
  );
}

interface MarkProps {
  y: number;
  hz: number;
  half: number | null;
  scale: ReturnType<typeof frequencyScale>;
}

function Mark({ y, hz, half, scale }: MarkProps) {
  return (
    <g stroke={palette.heather} strokeWidth="2">
      {half !== null && (
        <line
          x1={across(inside(scale.fractionOf(hz - half)), null)}
          x2={across(inside(scale.fractionOf(hz + half)), null)}
          y1={y}
          y2={y}
        />
      )}
      <circle cx={across(scale.fractionOf(hz), null)} cy={y} r="4" fill={palette.paper} />
    </g>
  );
}

/** Wide enough for every stop with its limits and every ghost; the left third is left to the names of the sweeps. */
function scaleOf({ stops, expected }: TrailPageData) {
  const all = [
    ...stops.flatMap(({ frequencyHz, uncertaintyHz }) => [
      frequencyHz - (uncertaintyHz ?? 0),
      frequencyHz + (uncertaintyHz ?? 0),
    ]),
    ...expected
      .filter(({ step }) => step.planned)
      .flatMap(({ frequencyHz, lowHz, highHz }) => [
        frequencyHz,
        lowHz ?? frequencyHz,
        highHz ?? frequencyHz,
      ]),
  ];
  const [low, high] = [Math.min(...all), Math.max(...all)];
  const margin = Math.max((high - low) * MARGIN_SHARE, high * LEAST_SHARE);
  const [from, to] = [low - margin, high + margin];
  return frequencyScale("linear", Math.max(0, from - (to - from) * NAMES_SHARE), to);
}

function inside(fraction: number): number {
  return Math.min(1, Math.max(0, fraction));
}

const AXIS_PX = 40;
const NAMES_SHARE = 0.45;
