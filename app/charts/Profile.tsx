import { type FrequencyScaleKind, frequencyScale } from "./axis";
import { type ChartPoints, decimate } from "./decimate";
import { PAGE_PALETTE, type Palette } from "./palette";
import { profilePaths } from "./paths";
import { across, Stretched } from "./place";
import { valueAxis } from "./value-axis";

export interface ProfileProps {
  points: ChartPoints;
  /** Only where they stand matters here. */
  dips?: readonly { frequencyHz: number; returnLossDb: number }[];
  /** The stretch shown; the whole sweep when left out. */
  fromHz?: number;
  toHz?: number;
  scale?: FrequencyScaleKind;
  heightPx?: number;
  /** Fixed width, for mails; a page's profile fits its place. */
  widthPx?: number;
  palette?: Palette;
}

const COLUMNS = 120;
/** A tall profile is looked at, not glanced at. */
const TALL_PX = 120;
const COLUMNS_OF_TALL = 480;

/** A sweep as a small strip of land, with a dot in each dip. Decoration: its row says the numbers. */
export function Profile(props: ProfileProps) {
  const { points, dips = [], scale: kind = "linear", heightPx = 40, widthPx, palette = PAGE_PALETTE } = props;
  const { frequencyHz } = points;
  const scale = frequencyScale(
    kind,
    props.fromHz ?? frequencyHz[0] ?? 0,
    props.toHz ?? frequencyHz[frequencyHz.length - 1] ?? 1,
  );
  const runs = decimate(points, scale, heightPx > TALL_PX ? COLUMNS_OF_TALL : COLUMNS);
  const magnitudes = runs.flatMap((run) => run.magnitudes);
  const lowestMagnitude = magnitudes.reduce((low, value) => Math.min(low, value), 1);
  const inner = heightPx - 2;
  const axis = valueAxis("rl", inner, { lowestMagnitude, highestMagnitude: 1 });
  // A fitted dip deeper than every sample stands at the line's lowest place.
  const deepestY = Math.min(inner, Math.max(0, axis.yOfMagnitude(lowestMagnitude)));
  const width = widthPx ?? 300;
  const paths = profilePaths(runs, { width, heightPx: inner, yOfMagnitude: axis.yOfMagnitude });
  const plotWidthPx = widthPx ?? null;
  return (
    <svg className="profile" width={widthPx ?? "100%"} height={heightPx} aria-hidden="true">
      <Stretched width={width} height={inner} plotWidthPx={plotWidthPx} y={1}>
        <path d={paths.land} fill={palette.land} />
        <path
          d={paths.line + paths.offScale}
          fill="none"
          stroke={palette.ink}
          strokeWidth="1.2"
          strokeLinejoin="round"
          strokeLinecap="round"
          vectorEffect="non-scaling-stroke"
        />
      </Stretched>
      {dips
        .filter((dip) => dip.frequencyHz >= scale.fromHz && dip.frequencyHz <= scale.toHz)
        .map((dip) => (
          <circle
            key={dip.frequencyHz}
            cx={across(scale.fractionOf(dip.frequencyHz), plotWidthPx)}
            cy={1 + Math.min(deepestY, Math.max(0, axis.yOfMagnitude(10 ** (-dip.returnLossDb / 20))))}
            r="2.5"
            fill={palette.heather}
          />
        ))}
    </svg>
  );
}
