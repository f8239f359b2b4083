import { PAGE_PALETTE } from "./palette";
import { At, across, Stretched } from "./place";
import type { StripScene } from "./strip-scene";
import type { PlacedTrail } from "./trail-names";

export interface StripTrailProps {
  placed: PlacedTrail;
  scene: StripScene;
  href?: string;
}

const palette = PAGE_PALETTE;

/** One dip followed from strip to strip: a line with a dot at each stop and its name at the newest. */
export function StripTrail({ placed, scene, href }: StripTrailProps) {
  const { trail, stops, name } = placed;
  const newest = stops[0];
  if (!newest) return null;
  const colour = palette[trail.tone];
  const words = `${trail.label}: ${stops.map((stop) => stop.words).join("; ")}`;
  const drawing = (
    <>
      <title>{words}</title>
      <Stretched width={scene.pathWidth} height={scene.heightPx} plotWidthPx={null}>
        <path d={placed.path} className="trail-reach" vectorEffect="non-scaling-stroke" />
        <path
          d={placed.path}
          className="trail-line"
          stroke={colour}
          strokeDasharray={trail.tone === "clay" ? "7 3" : undefined}
          vectorEffect="non-scaling-stroke"
        />
      </Stretched>
      {stops.map((stop) => (
        <circle
          key={stop.dipId}
          cx={across(stop.fraction, null)}
          cy={stop.y}
          r="4"
          fill={palette.paper}
          stroke={colour}
          strokeWidth="2"
        >
          <title>{stop.words}</title>
        </circle>
      ))}
      {name && (
        <At fraction={newest.fraction} y={newest.y} plotWidthPx={null} className={`tier-${name.tier}`}>
          <text
            x={name.side === "left" ? -10 : 10}
            y={name.shiftY + 4}
            textAnchor={name.side === "left" ? "end" : "start"}
            fontFamily={palette.monoFont}
            fontSize="11.5"
            fill={colour}
            stroke={palette.land}
            strokeWidth="4"
            paintOrder="stroke"
          >
            {trail.label}
          </text>
        </At>
      )}
    </>
  );
  if (!href) return <g className="trail">{drawing}</g>;
  return (
    <a href={href} className="trail" aria-label={words}>
      {drawing}
    </a>
  );
}
