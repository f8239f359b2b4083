import { FrequencyAxisMarks } from "~/charts/FrequencyAxisMarks";
import { PAGE_PALETTE } from "~/charts/palette";
import { across, Stretched } from "~/charts/place";
import { type BenchScene, type BenchStrip, STRIP_WIDTH } from "../bench-scene";

export interface BenchStripsProps {
  scene: BenchScene;
  /** What the drawing is, for those who do not see it. */
  label: string;
  /** The names of the benches, where there are two. */
  names?: readonly string[];
}

const PALETTE = PAGE_PALETTE;
/** One a bench; no two by colour alone. */
const PENS = [
  { stroke: PALETTE.ink, dash: undefined },
  { stroke: PALETTE.heather, dash: "7 4" },
] as const;

/** A bench's measures as strips of one country, the frequencies where the wish is met washed through all of them. */
export function BenchStrips({ scene, label, names }: BenchStripsProps) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing is not a set of form fields
    <div role="group" aria-label={label} className="chart-frame">
      {names && <Legend names={names} />}
      {scene.strips.map((strip) => (
        <div key={strip.key} className="bench-strip">
          <p className="text-small">
            <span className="font-semibold">{strip.title}</span>, <span className="soft">{strip.hint}</span>
          </p>
          <div className="chart">
            <svg
              width="100%"
              height={strip.heightPx + 14}
              overflow="visible"
              aria-hidden="true"
              className="block"
            >
              <g transform="translate(0 7)">
                <Strip strip={strip} known={scene.known} filled={!names} />
              </g>
            </svg>
          </div>
        </div>
      ))}
      <div className="chart">
        <svg width="100%" height="26" overflow="visible" aria-hidden="true" className="block">
          <FrequencyAxisMarks frequency={scene.frequency} y={1} plotWidthPx={null} palette={PALETTE} />
        </svg>
      </div>
      {scene.known.length > 0 && (
        <p className="text-tiny soft flex items-center gap-2">
          <svg width="18" height="12" aria-hidden="true">
            <rect width="18" height="12" fill={PALETTE.moss} opacity="0.18" />
          </svg>
          where the wished SWR is known{names ? ` with ${names[0]}` : ""}
        </p>
      )}
    </div>
  );
}

function Strip({ strip, known, filled }: { strip: BenchStrip; known: BenchScene["known"]; filled: boolean }) {
  const { heightPx: height, ticks, lines, needed } = strip;
  return (
    <>
      {known.map(({ fraction, widthFraction }) => (
        <rect
          key={fraction}
          x={across(fraction, null)}
          width={across(Math.max(widthFraction, 0.002), null)}
          y="0"
          height={height}
          fill={PALETTE.moss}
          opacity="0.18"
        />
      ))}
      <Stretched width={STRIP_WIDTH} height={height} plotWidthPx={null}>
        {filled && <path d={lines[0].land} fill={PALETTE.land} />}
      </Stretched>
      {ticks.map((tick) => (
        <g key={tick.label}>
          <line x1="0" x2="100%" y1={tick.y} y2={tick.y} stroke={PALETTE.rule} />
          <text
            x="-8"
            y={tick.y + 4}
            textAnchor="end"
            fontFamily={PALETTE.monoFont}
            fontSize="11.5"
            fill={PALETTE.soft}
          >
            {tick.label}
          </text>
        </g>
      ))}
      {needed && (
        <g>
          <line
            x1="0"
            x2="100%"
            y1={needed.y}
            y2={needed.y}
            stroke={PALETTE.moss}
            strokeWidth="1.5"
            strokeDasharray="4 3"
          />
          <text
            x="6"
            y={needed.y - 5}
            fontFamily={PALETTE.sansFont}
            fontSize="12"
            fill={PALETTE.moss}
            stroke={PALETTE.paper}
            strokeWidth="3"
            paintOrder="stroke"
          >
            {needed.label}
          </text>
        </g>
      )}
      <Stretched width={STRIP_WIDTH} height={height} plotWidthPx={null}>
        {lines.map(({ line }, i) => (
          <path
            key={PENS[i % PENS.length].stroke}
            d={line || "M0 0"}
            fill="none"
            stroke={PENS[i % PENS.length].stroke}
            strokeDasharray={PENS[i % PENS.length].dash}
            strokeWidth="1.6"
            strokeLinejoin="round"
            strokeLinecap="round"
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </Stretched>
    </>
  );
}

function Legend({ names }: { names: readonly string[] }) {
  return (
    <ul className="flex flex-wrap gap-x-6 gap-y-1 text-small mb-2">
      {names.map((name, i) => (
        <li key={name} className="flex items-center gap-2">
          <svg width="34" height="10" aria-hidden="true">
            <line
              x1="0"
              x2="34"
              y1="5"
              y2="5"
              stroke={PENS[i % PENS.length].stroke}
              strokeDasharray={PENS[i % PENS.length].dash}
              strokeWidth="2"
            />
          </svg>
          {name}
        </li>
      ))}
    </ul>
  );
}
