import { PAGE_PALETTE } from "./palette";
import { across } from "./place";
import type { PlacedGhost, PlacedTrail } from "./placed-trail";

const palette = PAGE_PALETTE;
const HALF_PX = 5;

/** Where steps should put the trails: hollow marks, each with its interval. */
export function StripGhosts({ trails }: { trails: readonly PlacedTrail[] }) {
  return trails.flatMap(({ id, ghosts, tone }) =>
    ghosts.map((ghost) => <GhostMark key={`${id} ${ghost.key}`} ghost={ghost} colour={palette[tone]} />),
  );
}

function GhostMark({ ghost, colour }: { ghost: PlacedGhost; colour: string }) {
  const { fraction, low, high, y, words } = ghost;
  return (
    <g className="ghost" stroke={colour} fill="none" strokeWidth="1.5">
      <title>{words}</title>
      {low !== null && high !== null && (
        <>
          <line x1={across(low, null)} x2={across(high, null)} y1={y} y2={y} />
          <line x1={across(low, null)} x2={across(low, null)} y1={y - HALF_PX} y2={y + HALF_PX} />
          <line x1={across(high, null)} x2={across(high, null)} y1={y - HALF_PX} y2={y + HALF_PX} />
        </>
      )}
      <circle cx={across(fraction, null)} cy={y} r="5.5" fill={palette.paper} strokeDasharray="2.6 2" />
    </g>
  );
}
