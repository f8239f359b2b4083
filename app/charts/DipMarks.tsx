import type { MouseEvent } from "react";
import { Cairn } from "./Cairn";
import type { Palette } from "./palette";
import { At, round } from "./place";
import type { Scene } from "./scene";
import { type SceneDip, STONE_HEIGHT_PX } from "./scene-dips";

export interface DipMarksProps {
  scene: Scene;
  palette: Palette;
  /** Where a dip's link leads; without it the marks are only drawn. */
  dipHref?: (dip: SceneDip["dip"]) => string;
  chosenDipId?: string | null;
  onPick?: (dipId: string) => void;
}

/** The dips: a ring at the lowest point and the cairn under it, each one link with spoken numbers. */
export function DipMarks({ scene, palette, dipHref, chosenDipId, onPick }: DipMarksProps) {
  return scene.dips.map((dip) => (
    <At key={dip.id} fraction={dip.fraction} y={dip.y} plotWidthPx={scene.plotWidthPx}>
      {dipHref ? (
        <a
          href={dipHref(dip.dip)}
          className="dip-mark"
          aria-label={dip.spoken}
          aria-current={dip.id === chosenDipId || undefined}
          onClick={onPick && ((event) => pick(event, dip.id, onPick))}
        >
          <Mark dip={dip} palette={palette} />
        </a>
      ) : (
        <Mark dip={dip} palette={palette} />
      )}
    </At>
  ));
}

function Mark({ dip, palette }: { dip: SceneDip; palette: Palette }) {
  const cairnTop = dip.cairnY - dip.y;
  const stem = round(dip.y - dip.lineY, 1);
  const bottom = cairnTop + Math.max(1, dip.stones) * STONE_HEIGHT_PX + 6;
  return (
    <>
      <title>{dip.spoken}</title>
      <rect
        x="-13"
        y="-13"
        width="26"
        height={Math.max(26, bottom + 13)}
        rx="4"
        fill="transparent"
        className="dip-hit"
      />
      {stem > 3 && <path d={`M0 ${-stem}V-3`} fill="none" stroke={palette.heather} strokeDasharray="2 2" />}
      <circle r="3" fill={palette.paper} stroke={palette.heather} strokeWidth="1.75" />
      <g transform={`translate(0 ${round(cairnTop, 2)})`}>
        <Cairn stones={dip.stones} colour={palette.heather} ground={palette.land} />
      </g>
    </>
  );
}

/** A plain press is answered on the page; with a modifier key the link does what links do. */
export function pick(event: MouseEvent, dipId: string, onPick: (dipId: string) => void) {
  if (event.metaKey || event.ctrlKey || event.shiftKey || event.altKey || event.button !== 0) return;
  event.preventDefault();
  onPick(dipId);
}
