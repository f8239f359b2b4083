import { memo } from "react";
import { PAGE_PALETTE } from "./palette";
import { across } from "./place";
import type { PlacedStrip } from "./placed-strip";
import { STRIP_UNITS, UNITS_PER_PX } from "./strip-path";

/** Room over the land for half the pen's width. */
const PEN_PX = 1;
const palette = PAGE_PALETTE;

/** One sweep as a thin profile of land. */
export const StripLand = memo(function StripLand({ placed }: { placed: PlacedStrip }) {
  const { landY, footY, path, dips } = placed;
  const heightPx = footY - landY;
  return (
    <g>
      {/* biome-ignore lint/a11y/noSvgWithoutTitle: a box inside a drawing, named by the whole */}
      <svg
        x="0"
        y={landY - PEN_PX}
        width="100%"
        height={heightPx + PEN_PX}
        viewBox={`0 ${-PEN_PX * UNITS_PER_PX} ${STRIP_UNITS} ${(heightPx + PEN_PX) * UNITS_PER_PX}`}
        preserveAspectRatio="none"
        overflow="hidden"
      >
        <path d={path.land} className={path.line === null ? "strip-land strip-pen" : "strip-land"} />
        {path.line !== null && <path d={path.line} className="strip-pen strip-line" />}
      </svg>
      <line x1="0" x2="100%" y1={footY} y2={footY} stroke={palette.rule} />
      {dips.map((dip) => (
        <circle key={dip.id} cx={across(dip.fraction, null)} cy={dip.y} r="2" fill={palette.soft} />
      ))}
    </g>
  );
});
