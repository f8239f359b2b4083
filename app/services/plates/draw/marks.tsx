import type { FrequencyAxis } from "../../../charts/axis.ts";
import type { Palette } from "../../../charts/palette.ts";
import type { RibbonBand } from "../../../charts/ribbon.ts";
import type { ValueTick } from "../../../charts/value-axis.ts";

/** What every figure of a plate has around its lines. All at fixed places in px: nothing is nested or stretched. */

export interface Plot {
  widthPx: number;
  heightPx: number;
  palette: Palette;
}

export const n = (value: number) => Math.round(value * 100) / 100;
/** From the plot's foot to the end of its axis and ribbon. */
export const FOOT_PX = 50;
const FONT_PX = 12;

/** The design bands behind a plot. */
export function Washes({ bands, plot }: { bands: readonly RibbonBand[]; plot: Plot }) {
  return bands
    .filter(({ design }) => design)
    .map(({ name, fraction, widthFraction }) => (
      <rect
        key={`${name} ${fraction}`}
        x={n(fraction * plot.widthPx)}
        y="0"
        width={n(Math.max(1, widthFraction * plot.widthPx))}
        height={plot.heightPx}
        fill={plot.palette.wash}
      />
    ));
}

/** Lines across a plot with their values at its left. `skipY`: where another label stands. */
export function ValueMarks({
  ticks,
  plot,
  skipY = null,
}: {
  ticks: readonly ValueTick[];
  plot: Plot;
  skipY?: number | null;
}) {
  return ticks.map(({ y, label }) => (
    <g key={label}>
      <line x1="0" x2={plot.widthPx} y1={n(y)} y2={n(y)} stroke={plot.palette.edge} strokeDasharray="1 4" />
      {(skipY === null || Math.abs(skipY - y) > 11) && (
        <text
          x="-8"
          y={n(y + 4)}
          textAnchor="end"
          fontFamily={plot.palette.monoFont}
          fontSize={FONT_PX}
          fill={plot.palette.soft}
        >
          {label}
        </text>
      )}
    </g>
  ));
}

/** The frequency axis at a plot's foot, and the ribbon of bands under it. */
export function Foot({
  frequency,
  ribbon,
  plot,
}: {
  frequency: FrequencyAxis;
  ribbon: readonly RibbonBand[];
  plot: Plot;
}) {
  const { widthPx, heightPx, palette } = plot;
  const first = frequency.ticks.find(({ label }) => label !== null);
  // The unit stands left of the first number, and yields where that stands at the very edge.
  const captionX = Math.min(-8, (first?.fraction ?? 0) * widthPx - (first?.label?.length ?? 0) * 4 - 10);
  return (
    <g fontFamily={palette.monoFont} fontSize={FONT_PX} fill={palette.soft}>
      <line x1="0" x2={widthPx} y1={heightPx} y2={heightPx} stroke={palette.ink} strokeWidth="1.25" />
      {frequency.ticks.map(({ hz, fraction, label }) => (
        <g key={hz}>
          <line
            x1={n(fraction * widthPx)}
            x2={n(fraction * widthPx)}
            y1={heightPx}
            y2={heightPx + (label === null ? 3 : 5)}
            stroke={palette.soft}
          />
          {label !== null && (
            <text x={n(fraction * widthPx)} y={heightPx + 17} textAnchor="middle">
              {label}
            </text>
          )}
        </g>
      ))}
      <text x={n(captionX)} y={heightPx + 17} textAnchor="end">
        {frequency.caption.replace(" log", "")}
      </text>
      {ribbon.length > 0 && <Ribbon ribbon={ribbon} plot={plot} />}
    </g>
  );
}

function Ribbon({
  ribbon,
  plot: { widthPx, heightPx, palette },
}: {
  ribbon: readonly RibbonBand[];
  plot: Plot;
}) {
  const y = heightPx + 25;
  return (
    <g>
      <line x1="0" x2={widthPx} y1={y + 4} y2={y + 4} stroke={palette.rule} />
      {ribbon.map(({ name, design, fraction, widthFraction, tier }) => {
        const colour = design ? palette.fen : palette.allocation;
        return (
          <g key={`${name} ${design} ${fraction}`}>
            <rect
              x={n(fraction * widthPx)}
              y={design ? y : y + 2}
              width={n(Math.max(1, widthFraction * widthPx))}
              height={design ? 8 : 4}
              fill={colour}
            />
            {tier !== null && (
              <text
                x={n((fraction + widthFraction / 2) * widthPx)}
                y={y + 21}
                textAnchor="middle"
                fontSize={FONT_PX - 1}
                fill={design ? palette.fen : palette.soft}
              >
                {name}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

/** What is off the scale, at a plot's top left. */
export function Remarks({ remarks, plot }: { remarks: readonly string[]; plot: Plot }) {
  return remarks.map((remark, i) => (
    <text
      key={remark}
      x="6"
      y={14 + i * 14}
      fontFamily={plot.palette.sansFont}
      fontSize={FONT_PX}
      fill={plot.palette.clay}
    >
      {remark}
    </text>
  ));
}

/** A dip: its ring on the line, its letter beside it. */
export function DipMark({
  x,
  y,
  letter,
  colour,
  letterColour = colour,
  plot,
}: {
  x: number;
  y: number;
  letter: string;
  colour: string;
  letterColour?: string;
  plot: Plot;
}) {
  // Under the ring there is land; where there is no room left, beside it.
  const low = y > plot.heightPx - 20;
  const left = x > plot.widthPx - 16;
  return (
    <g>
      <circle cx={n(x)} cy={n(y)} r="3.5" fill={plot.palette.paper} stroke={colour} strokeWidth="1.75" />
      {letter !== "" && (
        <text
          x={n(low ? x + (left ? -8 : 8) : x)}
          y={n(low ? y - 3 : y + 17)}
          textAnchor={low ? (left ? "end" : "start") : "middle"}
          fontFamily={plot.palette.sansFont}
          fontSize="13"
          fontWeight="700"
          fill={letterColour}
        >
          {letter}
        </text>
      )}
    </g>
  );
}
