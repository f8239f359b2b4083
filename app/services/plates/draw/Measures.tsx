import { frequencyAxis, frequencyScale, niceStep } from "../../../charts/axis.ts";
import { decimate, type Run } from "../../../charts/decimate.ts";
import { profilePaths } from "../../../charts/paths.ts";
import { ribbonBands } from "../../../charts/ribbon.ts";
import type { PlateFigure } from "../record.ts";
import { Foot, n, type Plot, ValueMarks, Washes } from "./marks.tsx";
import { bandsOf, pointsOf } from "./values.ts";

/** What a bench can do: each measure as a line in a strip of its own, all on one frequency axis. */
export function Measures({ figure, plot }: { figure: PlateFigure; plot: Omit<Plot, "heightPx"> }) {
  const { widthPx, palette } = plot;
  const { fromHz, toHz, scale: kind } = figure.frequency;
  const scale = frequencyScale(kind, fromHz, toHz);
  const ribbon = ribbonBands(scale, bandsOf(figure, false), bandsOf(figure, true), [widthPx]);
  const whole = { ...plot, heightPx: measuresHeightPx(figure) };
  const strip = { ...plot, heightPx: STRIP_PX };
  return (
    <g>
      <rect width={widthPx} height={whole.heightPx} fill={palette.surface} />
      <Washes bands={ribbon} plot={whole} />
      {figure.traces.map((trace, i) => {
        const runs = decimate(pointsOf(trace), scale, Math.round(widthPx / 2));
        const axis = axisOf(runs);
        const paths = profilePaths(runs, { width: widthPx, heightPx: STRIP_PX, yOfMagnitude: axis.yOf });
        return (
          <g key={trace.id} transform={`translate(0 ${i * ROW_PX + TITLE_PX})`}>
            <text x="6" y="-7" fontFamily={palette.sansFont} fontSize="13" fill={palette.ink}>
              {`${trace.label}, ${trace.caption}`}
            </text>
            <ValueMarks ticks={axis.ticks} plot={strip} />
            <path
              d={`${paths.line}${paths.offScale}` || "M0 0"}
              fill="none"
              stroke={palette.ink}
              strokeWidth="1.6"
              strokeLinejoin="round"
            />
          </g>
        );
      })}
      <Foot frequency={frequencyAxis(scale, [widthPx])} ribbon={ribbon} plot={whole} />
    </g>
  );
}

/** Height of the strips alone, px. */
export function measuresHeightPx({ traces }: PlateFigure): number {
  return Math.max(1, traces.length) * ROW_PX + 8;
}

/** Round values over and under what is drawn, the larger above. */
function axisOf(runs: readonly Run[]) {
  const values = runs.flatMap(({ magnitudes }) => magnitudes);
  let low = values.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY);
  let high = values.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY);
  if (!Number.isFinite(low)) [low, high] = [0, 1];
  if (high - low < LEAST_DB) [low, high] = [(low + high - LEAST_DB) / 2, (low + high + LEAST_DB) / 2];
  const step = niceStep((high - low) / 3);
  const bottom = Math.floor(low / step + 1e-9) * step;
  const top = Math.ceil(high / step - 1e-9) * step;
  const yOf = (value: number) => n(((top - value) / (top - bottom)) * STRIP_PX);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const count = Math.round((top - bottom) / step);
  const ticks = Array.from({ length: count + 1 }, (_, i) => {
    const value = top - i * step;
    const text = (Math.abs(value) < step / 2 ? 0 : value).toFixed(decimals).replace("-", "−");
    return { y: yOf(value), label: i === 0 ? `${text} dB` : text };
  });
  return { yOf, ticks };
}

const STRIP_PX = 84;
const TITLE_PX = 26;
const ROW_PX = STRIP_PX + TITLE_PX + 10;
/** A flat line shows its flatness, not its last digit. */
const LEAST_DB = 1;
