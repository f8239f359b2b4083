import type { Palette } from "./palette";
import { At } from "./place";

export interface LabelProps {
  fraction: number;
  y: number;
  text: string;
  colour: string;
  /** Narrowest tier at which it is shown. */
  tier?: number;
  plotWidthPx: number | null;
  palette: Palette;
}

/** A short text on a drawing; a rim of paper keeps lines from running through it. */
export function Label({ fraction, y, text, colour, tier = 0, plotWidthPx, palette }: LabelProps) {
  return (
    <At fraction={fraction} y={y} plotWidthPx={plotWidthPx} className={tier > 0 ? `tier-${tier}` : undefined}>
      <text
        textAnchor="middle"
        fontFamily={palette.monoFont}
        fontSize="11.5"
        fill={colour}
        stroke={palette.paper}
        strokeWidth="4"
        strokeLinejoin="round"
        paintOrder="stroke"
      >
        {text}
      </text>
    </At>
  );
}
