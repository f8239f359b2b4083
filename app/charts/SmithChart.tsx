import type { CSSProperties, ReactNode } from "react";
import type { Complex } from "../measurement/reflection.ts";
import { Cairn } from "./Cairn";
import type { ChartDip } from "./chart-types";
import { pick } from "./DipMarks";
import { PAGE_PALETTE, type Palette } from "./palette";
import { round } from "./place";
import { MOST_STONES, speakDip } from "./scene-dips";
import { SMITH_RADIUS, smithGrid, smithLabels, smithSpot, swrRadius } from "./smith";
import { type ComplexPoints, smithTrace, traceTicks } from "./smith-trace";

export interface SmithDip {
  dip: ChartDip;
  gamma: Complex;
}

export interface SmithChartProps {
  points: ComplexPoints;
  dips: readonly SmithDip[];
  referenceOhm: number;
  swrLimit: number;
  /** What the chart is, for those who do not see it. */
  label: string;
  dipHref?: (dip: ChartDip) => string;
  chosenDipId?: string | null;
  onPick?: (dipId: string) => void;
  /** The part that is in view; all of it when left out. */
  window?: SmithWindow;
  palette?: Palette;
  /** A layer between the line and the dips, over the drawing exactly. */
  children?: ReactNode;
}

/** In units of the radius: the middle of the view and half its side. */
export interface SmithWindow {
  re: number;
  im: number;
  half: number;
}

/** Room around the rim for its labels. */
export const WHOLE_WINDOW: SmithWindow = { re: 0, im: 0, half: 1.18 };

/** The plane of Γ with a sweep's line, its dips and the hollow under the SWR limit. Complete without scripts. */
export function SmithChart(props: SmithChartProps) {
  const {
    points,
    dips,
    referenceOhm,
    swrLimit,
    label,
    window = WHOLE_WINDOW,
    palette = PAGE_PALETTE,
  } = props;
  const zoom = WHOLE_WINDOW.half / window.half;
  const side = 2 * window.half * SMITH_RADIUS;
  const middle = smithSpot(window);
  const spots = dips.map(({ gamma }) => smithSpot(gamma));
  const viewBox = [middle.x - side / 2, middle.y - side / 2, side, side].map((n) => round(n, 2)).join(" ");
  const style = { "--smith-zoom": round(zoom, 3) } as CSSProperties;
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing is not a set of form fields
    <div role="group" aria-label={label} className="smith-frame">
      <svg className="smith" viewBox={viewBox} style={style} aria-hidden="true">
        <Ground {...{ referenceOhm, swrLimit, palette }} />
        <TraceLine points={points} palette={palette} />
        <LimitLabel swrLimit={swrLimit} zoom={zoom} palette={palette} />
        <Ticks
          points={points}
          most={Math.min(MOST_TICKS, 10 * zoom)}
          taken={spots}
          zoom={zoom}
          palette={palette}
        />
      </svg>
      {props.children && <div className="smith-layer">{props.children}</div>}
      {/* biome-ignore lint/a11y/noSvgWithoutTitle: its links carry their own names */}
      <svg className="smith smith-layer chart-marks" viewBox={viewBox} style={style}>
        {dips.map(({ dip }, index) => (
          <DipMark key={dip.id} dip={dip} spot={spots[index]} zoom={zoom} palette={palette} {...props} />
        ))}
      </svg>
    </div>
  );
}

/** More would crowd the line from end to end, wherever one looks. */
const MOST_TICKS = 100;

interface GroundProps {
  referenceOhm: number;
  swrLimit: number;
  palette: Palette;
}

function Ground({ referenceOhm, swrLimit, palette }: GroundProps) {
  const hollow = round(swrRadius(swrLimit), 2);
  return (
    <>
      <circle r={SMITH_RADIUS} fill={palette.land} />
      <circle r={hollow} fill={palette.water} />
      <g fill="none" stroke={palette.edge} className="smith-grid">
        {smithGrid().map(({ kind, value, path }) => (
          <path key={`${kind}${value}`} d={path} strokeDasharray={kind === "x" ? "1 3" : undefined} />
        ))}
        <path d={`M${-SMITH_RADIUS} 0H${SMITH_RADIUS}`} />
      </g>
      <circle r={hollow} fill="none" stroke={palette.moss} strokeWidth="1.5" strokeDasharray="4 3" />
      <circle r={SMITH_RADIUS} fill="none" stroke={palette.ink} strokeWidth="1.25" />
      <g fill={palette.soft} fontFamily={palette.monoFont} className="smith-label">
        {smithLabels(referenceOhm).map(({ x, y, text, anchor }) => (
          <text key={text} x={round(x, 1)} y={round(y, 1)} textAnchor={anchor}>
            {text}
          </text>
        ))}
      </g>
    </>
  );
}

/** Over the line, which may run through it. */
function LimitLabel({ swrLimit, zoom, palette }: Omit<GroundProps, "referenceOhm"> & { zoom: number }) {
  return (
    <g transform={`translate(0 ${round(swrRadius(swrLimit), 2)}) scale(${round(1 / zoom, 4)})`}>
      <text
        y="13"
        textAnchor="middle"
        fill={palette.moss}
        stroke={palette.land}
        fontFamily={palette.monoFont}
        className="smith-tick"
      >
        SWR {swrLimit}
      </text>
    </g>
  );
}

function TraceLine({ points, palette }: { points: ComplexPoints; palette: Palette }) {
  const { inside, outside } = smithTrace(points);
  const pen = { fill: "none", strokeWidth: 1.8, strokeLinejoin: "round", strokeLinecap: "round" } as const;
  return (
    <>
      <path d={inside || "M0 0"} stroke={palette.ink} {...pen} />
      {outside && <path d={outside} stroke={palette.clay} strokeDasharray="3 4" {...pen} />}
    </>
  );
}

interface TicksProps {
  points: ComplexPoints;
  most: number;
  taken: { x: number; y: number }[];
  zoom: number;
  palette: Palette;
}

function Ticks({ points, most, taken, zoom, palette }: TicksProps) {
  return traceTicks(points, most, taken, zoom).map(({ x, y, hz, label, across, shown }) => (
    <g key={hz} transform={`translate(${round(x, 1)} ${round(y, 1)}) scale(${round(1 / zoom, 4)})`}>
      <path
        d={`M${round(-across.x * 3, 1)} ${round(-across.y * 3, 1)}L${round(across.x * 6, 1)} ${round(across.y * 6, 1)}`}
        stroke={palette.ink}
        strokeWidth="1.25"
      />
      {shown && (
        <text
          x={round(across.x * 15, 1)}
          y={round(across.y * 12 + 4, 1)}
          textAnchor="middle"
          fill={palette.ink}
          stroke={palette.land}
          fontFamily={palette.monoFont}
          className="smith-tick"
        >
          {label}
        </text>
      )}
    </g>
  ));
}

interface DipMarkProps extends Pick<SmithChartProps, "dipHref" | "chosenDipId" | "onPick"> {
  dip: ChartDip;
  spot: { x: number; y: number };
  zoom: number;
  palette: Palette;
}

function DipMark({ dip, spot, zoom, palette, dipHref, chosenDipId, onPick }: DipMarkProps) {
  const place = `translate(${round(spot.x, 1)} ${round(spot.y, 1)}) scale(${round(1 / zoom, 4)})`;
  const mark = (
    <>
      <title>{speakDip(dip)}</title>
      <rect x="-14" y="-12" width="28" height="50" rx="4" fill="transparent" className="dip-hit" />
      <g transform="translate(0 8)">
        <Cairn stones={Math.min(MOST_STONES, dip.noteCount)} colour={palette.heather} ground={palette.land} />
      </g>
      <circle r="3.5" fill={palette.paper} stroke={palette.heather} strokeWidth="2" />
    </>
  );
  return (
    <g transform={place}>
      {dipHref ? (
        <a
          href={dipHref(dip)}
          className="dip-mark"
          aria-label={speakDip(dip)}
          aria-current={dip.id === chosenDipId || undefined}
          onClick={onPick && ((event) => pick(event, dip.id, onPick))}
        >
          {mark}
        </a>
      ) : (
        mark
      )}
    </g>
  );
}
