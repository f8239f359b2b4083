import { frequencyAxis, frequencyScale } from "../../../charts/axis.ts";
import { decimate } from "../../../charts/decimate.ts";
import type { Palette } from "../../../charts/palette.ts";
import { profilePaths } from "../../../charts/paths.ts";
import { ribbonBands } from "../../../charts/ribbon.ts";
import type { PlateFigure } from "../record.ts";
import { DipMark, Foot, n, type Plot, Washes } from "./marks.tsx";
import { type PlacedName, placeNames } from "./trail-names.ts";
import { bandsOf, drawnDips, pointsOf } from "./values.ts";

/** Sweeps as strips of the same country, newest on top, with the trails across them and the steps between. */
export function Strips({ figure, plot }: { figure: PlateFigure; plot: Omit<Plot, "heightPx"> }) {
  const { widthPx, palette } = plot;
  const { fromHz, toHz, scale: kind } = figure.frequency;
  const scale = frequencyScale(kind, fromHz, toHz);
  const { rows, heightPx, depthPx } = stripRows(figure);
  const ribbon = ribbonBands(scale, bandsOf(figure, false), bandsOf(figure, true), [widthPx]);
  const yOfDb = (db: number) => Math.min(depthPx, Math.max(0, (db / DEEPEST_DB) * depthPx));
  const place = new Map(
    drawnDips(figure).map((dip) => {
      const row = rows.find(({ trace }) => trace.id === dip.trace);
      const x = scale.fractionOf(dip.frequencyHz) * widthPx;
      return [dip.id, { x, y: (row?.y ?? 0) + yOfDb(dip.returnLossDb) }] as const;
    }),
  );
  const whole = { ...plot, heightPx };
  const trails = figure.trails.map(({ id, label, tone, stops }) => ({
    id,
    tone,
    name: shortened(label, MOST_NAME),
    stops: stops.flatMap(({ dip }) => place.get(dip) ?? []).sort((a, b) => a.y - b.y),
  }));
  const captions = rows.map(({ trace, y }) => ({
    left: 6,
    right: 6 + captionOf(trace).length * CHARACTER_PX,
    top: y + depthPx + GROUND_PX - 16,
    bottom: y + depthPx + GROUND_PX,
  }));
  const names = placeNames(trails, widthPx, captions);
  const onTrails = new Set(figure.trails.flatMap(({ stops }) => stops.map(({ dip }) => dip)));
  return (
    <g>
      <rect width={widthPx} height={heightPx} fill={palette.surface} />
      <Washes bands={ribbon} plot={whole} />
      {rows.map(({ trace, y, steps }) => {
        const runs = decimate(pointsOf(trace), scale, Math.round(widthPx / 2));
        const yOfMagnitude = (m: number) => yOfDb(-20 * Math.log10(m));
        const paths = profilePaths(runs, { width: widthPx, heightPx: depthPx + GROUND_PX, yOfMagnitude });
        return (
          <g key={trace.id} transform={`translate(0 ${y})`}>
            <path d={paths.land || "M0 0"} fill={palette.land} />
            <path
              d={`${paths.line}${paths.offScale}` || "M0 0"}
              fill="none"
              stroke={palette.ink}
              strokeWidth="1.3"
              strokeLinejoin="round"
            />
            <line
              x1="0"
              x2={widthPx}
              y1={depthPx + GROUND_PX}
              y2={depthPx + GROUND_PX}
              stroke={palette.rule}
            />
            <Words x={6} y={depthPx + GROUND_PX - 5} text={captionOf(trace)} {...{ widthPx, palette }} />
            {steps.map(({ id, label, caption }, i) => (
              <g key={id}>
                <path d={`M8 ${depthPx + GROUND_PX + STEP_PX * i + 7}l4 5-4 5-4-5z`} fill={palette.clay} />
                <Words
                  x={20}
                  y={depthPx + GROUND_PX + STEP_PX * i + 16}
                  text={[label, caption].filter(Boolean).join(", ")}
                  colour={palette.clay}
                  {...{ widthPx, palette }}
                />
              </g>
            ))}
          </g>
        );
      })}
      {figure.show.dips &&
        [...place]
          .filter(([id]) => !onTrails.has(id))
          .map(([id, { x, y }]) => <circle key={id} cx={n(x)} cy={n(y)} r="2" fill={palette.soft} />)}
      {figure.show.dips &&
        trails.map(({ id, name, tone, stops }) => (
          <Trail key={id} name={name} at={names.get(id)} colour={palette[tone]} stops={stops} plot={whole} />
        ))}
      <Foot frequency={frequencyAxis(scale, [widthPx])} ribbon={ribbon} plot={whole} />
    </g>
  );
}

function captionOf({ label, caption }: PlateFigure["traces"][number]): string {
  return `${label}, ${caption}`;
}

/** Height of the strips alone, px. */
export function stripsHeightPx(figure: PlateFigure): number {
  return stripRows(figure).heightPx;
}

/** Newest first, as they stand from the top; the steps of a row are those that led to it, written under it. */
function stripRows({ traces, steps }: PlateFigure) {
  const depthPx = DEPTHS_PX.find(([most]) => traces.length <= most)?.[1] ?? 30;
  let y = STEP_PX / 2;
  const rows = [...traces].reverse().map((trace) => {
    const own = steps.filter(({ before }) => before === trace.id);
    const row = { trace, y, steps: own };
    y += depthPx + GROUND_PX + own.length * STEP_PX;
    return row;
  });
  return { rows, heightPx: y, depthPx };
}

interface TrailProps {
  name: string;
  at: PlacedName | undefined;
  colour: string;
  /** Newest first. */
  stops: { x: number; y: number }[];
  plot: Plot;
}

function Trail({ name, at, colour, stops, plot }: TrailProps) {
  if (!at) return null;
  return (
    <g>
      <path
        d={`M${stops.map(({ x, y }) => `${n(x)} ${n(y)}`).join("L")}`}
        fill="none"
        stroke={colour}
        strokeWidth="1.75"
      />
      {stops.map(({ x, y }) => (
        <DipMark key={y} x={x} y={y} letter="" colour={colour} plot={plot} />
      ))}
      <text
        x={n(at.x)}
        y={n(at.y)}
        textAnchor={at.anchor}
        fontFamily={plot.palette.sansFont}
        fontSize="12"
        fontWeight="600"
        fill={colour}
      >
        {name}
      </text>
    </g>
  );
}

function Words({
  x,
  y,
  text,
  widthPx,
  palette,
  colour = palette.soft,
}: {
  x: number;
  y: number;
  text: string;
  widthPx: number;
  palette: Palette;
  colour?: string;
}) {
  return (
    <text x={x} y={n(y)} fontFamily={palette.sansFont} fontSize="12" fill={colour}>
      {shortened(text, Math.floor((widthPx - x) / CHARACTER_PX))}
    </text>
  );
}

function shortened(text: string, most: number): string {
  const characters = Array.from(text);
  return characters.length <= most ? text : `${characters.slice(0, most - 1).join("")}…`;
}

/** As on the strip map: one depth for all, so that a deeper hollow is deeper in truth. */
const DEEPEST_DB = 30;
const DEPTHS_PX: readonly [most: number, px: number][] = [
  [10, 68],
  [20, 54],
  [40, 40],
];
const GROUND_PX = 21;
const STEP_PX = 22;
const MOST_NAME = 28;
const CHARACTER_PX = 6.6;
