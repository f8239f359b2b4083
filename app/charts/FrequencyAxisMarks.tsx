import type { FrequencyAxis } from "./axis";
import { Label } from "./Label";
import type { Palette } from "./palette";
import { across } from "./place";

export interface FrequencyAxisMarksProps {
  frequency: FrequencyAxis;
  /** Where the axis lies. */
  y: number;
  plotWidthPx: number | null;
  palette: Palette;
}

/** Ticks and numbers under a frequency axis, its unit in the left margin. */
export function FrequencyAxisMarks({ frequency, y, plotWidthPx, palette }: FrequencyAxisMarksProps) {
  return (
    <g>
      {frequency.ticks.map((tick) => (
        <g key={tick.hz}>
          <line
            x1={across(tick.fraction, plotWidthPx)}
            x2={across(tick.fraction, plotWidthPx)}
            y1={y}
            y2={y + (tick.label === null ? 3 : 5)}
            stroke={palette.soft}
          />
          {tick.label !== null && (
            <Label
              fraction={tick.fraction}
              y={y + 17}
              tier={tick.tier}
              text={tick.label}
              colour={palette.soft}
              {...{ plotWidthPx, palette }}
            />
          )}
        </g>
      ))}
      <text
        className="axis-caption"
        x={captionX(frequency)}
        y={y + 17}
        textAnchor="end"
        fontFamily={palette.monoFont}
        fontSize="11.5"
        fill={palette.soft}
      >
        {frequency.caption}
      </text>
    </g>
  );
}

/** Right end of the unit's name: left of the first number, also where that stands at the very edge. */
function captionX({ ticks }: FrequencyAxis): number {
  const first = ticks.find((tick) => tick.label !== null);
  const reach = (first?.label?.length ?? 0) * HALF_CHARACTER_PX - (first?.fraction ?? 0) * NARROWEST_PLOT_PX;
  return -8 - Math.max(0, reach);
}

const HALF_CHARACTER_PX = 3.6;
const NARROWEST_PLOT_PX = 240;
