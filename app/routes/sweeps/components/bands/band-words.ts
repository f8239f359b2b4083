import type { BandFigures } from "~/measurement/band-figures";
import { formatFrequency, formatPercent, formatSwr } from "~/measurement/units";

/** "7–7.2 MHz", one unit where both have the same. */
export function bandEdges({ lowHz, highHz }: { lowHz: number; highHz: number }): string {
  const [low, high] = [formatFrequency(lowHz), formatFrequency(highHz)];
  const unit = high.match(THIN_AND_UNIT)?.[0];
  return unit && low.endsWith(unit) ? `${low.slice(0, -unit.length)}–${high}` : `${low} – ${high}`;
}

/** "78 % under 2:1"; of what is covered, and that is said where it is not all. */
export function shareWords({ shareUnder, limitSwr, covered }: BandFigures): string {
  if (shareUnder === null) return "not swept";
  const share = shareUnder === 0 ? "nothing" : shareUnder === 1 ? "all" : percent(shareUnder);
  const partly = covered < 1 ? ` of the ${percent(covered)} that is swept` : "";
  return `${share}${partly} under ${limitSwr}:1`;
}

/** "1.32 at 7.08 MHz"; "unknown" where nothing of the band is swept. */
export function bestWords({ bestHz, bestSwr }: BandFigures): string {
  if (bestHz === null || bestSwr === null) return "unknown";
  return `${formatSwr(bestSwr)} at ${formatFrequency(Number(bestHz.toPrecision(5)))}`;
}

/** SWR at an edge or the middle. */
export function swrWords(swr: number | null): string {
  return swr === null ? "not swept" : swr > MOST_SWR ? `over ${MOST_SWR}` : formatSwr(swr);
}

/** "+42.3 kHz (+0.6 %)". */
export function offsetWords(hz: number, share: number): string {
  const sign = hz < 0 ? "−" : "+";
  return `${sign}${offsetSize(Math.abs(hz))} (${sign}${formatPercent(Math.abs(share))})`;
}

/** Kilohertz, as targets are spoken of; from 10 MHz on that would be too many digits. */
function offsetSize(hz: number): string {
  if (hz >= 10e6) return `${(hz / 1e6).toFixed(1)}\u2009MHz`;
  return `${(hz / 1e3).toFixed(hz >= 100e3 ? 0 : 1)}\u2009kHz`;
}

/** A share between none and all never prints as either. */
function percent(share: number): string {
  const whole = Math.min(99, Math.max(1, Math.round(share * 100)));
  return `${whole}\u2009%`;
}

const THIN_AND_UNIT = /\u2009\S+$/;
/** Beyond this a number says no more than that all comes back. */
const MOST_SWR = 100;
