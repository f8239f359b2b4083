import { Label } from "./Label";
import type { Palette } from "./palette";
import { At, across } from "./place";
import type { Hang, RibbonBand } from "./ribbon";
import type { SceneDip } from "./scene-dips";

export interface BandRibbonProps {
  bands: readonly RibbonBand[];
  dips: readonly SceneDip[];
  /** Top edge of the ribbon. */
  y: number;
  plotWidthPx: number | null;
  palette: Palette;
}

export const RIBBON_BAR_PX = 8;
/** From the ribbon to the weight, past the row of names. */
const HANG_PX = 24;

/** The ribbon of bands under a frequency axis; what lies outside the bands hangs off it. */
export function BandRibbon({ bands, dips, y, plotWidthPx, palette }: BandRibbonProps) {
  return (
    <g>
      <line x1="0" x2={across(1, plotWidthPx)} y1={y + 4} y2={y + 4} stroke={palette.rule} />
      {bands.map((band) => (
        <BandBar key={keyOf(band)} {...{ band, y, plotWidthPx, palette }} />
      ))}
      {dips.map(({ id, fraction, hang }) =>
        hang ? (
          <At key={id} fraction={fraction} y={y + 4} plotWidthPx={plotWidthPx}>
            <HangingMark hang={hang} palette={palette} />
          </At>
        ) : null,
      )}
      {bands.map((band) => (
        <BandName key={keyOf(band)} {...{ band, y, plotWidthPx, palette }} />
      ))}
    </g>
  );
}

interface BandProps {
  band: RibbonBand;
  y: number;
  plotWidthPx: number | null;
  palette: Palette;
}

function BandBar({ band, y, plotWidthPx, palette }: BandProps) {
  const colour = band.design ? palette.fen : palette.allocation;
  const inset = band.design ? 0 : 2;
  return (
    <rect
      x={across(band.fraction, plotWidthPx)}
      y={y + inset}
      width={across(band.widthFraction, plotWidthPx)}
      height={RIBBON_BAR_PX - 2 * inset}
      fill={colour}
      stroke={colour}
      strokeWidth="1"
    >
      <title>{`${band.name}${band.design ? ", design band" : ""}`}</title>
    </rect>
  );
}

function BandName({ band, y, plotWidthPx, palette }: BandProps) {
  if (band.tier === null) return null;
  return (
    <Label
      fraction={band.fraction + band.widthFraction / 2}
      y={y + RIBBON_BAR_PX + 13}
      tier={band.tier}
      text={band.name}
      colour={band.design ? palette.fen : palette.soft}
      {...{ plotWidthPx, palette }}
    />
  );
}

function keyOf(band: RibbonBand): string {
  return `${band.name} ${band.design} ${band.fraction}`;
}

/** A weight on a line below the names: full outside every band, open outside the design bands only. */
function HangingMark({ hang, palette }: { hang: Hang; palette: Palette }) {
  return (
    <g stroke={palette.clay} strokeWidth="1.5" fill={hang === "outside-all" ? palette.clay : palette.paper}>
      <path d={`M0 0V${HANG_PX}`} fill="none" />
      <path d={`M0 ${HANG_PX}l4 5-4 5-4-5z`} />
    </g>
  );
}
