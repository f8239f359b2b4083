import { PAGE_PALETTE } from "./palette";
import { across } from "./place";
import type { RibbonBand } from "./ribbon";
import type { ValueTick } from "./value-axis";

const palette = PAGE_PALETTE;

/** The design bands behind a plot. */
export function Washes({ bands, heightPx }: { bands: readonly RibbonBand[]; heightPx: number }) {
  return bands
    .filter(({ design }) => design)
    .map((band) => (
      <rect
        key={`${band.name} ${band.fraction}`}
        x={across(band.fraction, null)}
        y="0"
        width={across(Math.max(band.widthFraction, 0.001), null)}
        height={heightPx}
        fill={palette.wash}
      />
    ));
}

/** Lines across a plot with their values at its left, and the foot it stands on. */
export function ValueMarks({ ticks, heightPx }: { ticks: readonly ValueTick[]; heightPx: number }) {
  return (
    <g>
      {ticks.map(({ y, label }) => (
        <g key={label}>
          <line x1="0" x2="100%" y1={y} y2={y} stroke={palette.rule} strokeDasharray="1 4" />
          <text
            x="-8"
            y={y + 4}
            textAnchor="end"
            fontFamily={palette.monoFont}
            fontSize="11.5"
            fill={palette.soft}
          >
            {label}
          </text>
        </g>
      ))}
      <line x1="0" x2="100%" y1={heightPx} y2={heightPx} stroke={palette.ink} strokeWidth="1.25" />
    </g>
  );
}
