import type { Dip, Sweep } from "../measurement/sweep.ts";

/** Some widths of a dip to each side, as far as its sweep goes. */
export function closeUpRange(
  { frequencyHz, bandwidth }: Pick<Dip, "frequencyHz" | "bandwidth">,
  points: Pick<Sweep, "frequencyHz"> | null,
): { fromHz: number; toHz: number } {
  const reachHz = Math.max(
    (bandwidth?.widthHz ?? 0) * CLOSE_UP_WIDTHS,
    frequencyHz * CLOSE_UP_SHARE,
    stepOf(points) * CLOSE_UP_STEPS,
  );
  const hz = points?.frequencyHz;
  const first = hz?.length ? hz[0] : frequencyHz - reachHz;
  const last = hz?.length ? hz[hz.length - 1] : frequencyHz + reachHz;
  return {
    fromHz: Math.max(first, frequencyHz - reachHz),
    toHz: Math.min(last, frequencyHz + reachHz),
  };
}

function stepOf(points: Pick<Sweep, "frequencyHz"> | null): number {
  const n = points?.frequencyHz.length ?? 0;
  return points && n > 1 ? (points.frequencyHz[n - 1] - points.frequencyHz[0]) / (n - 1) : 0;
}

const CLOSE_UP_WIDTHS = 2.5;
/** For a dip without a bandwidth: a twentieth of its frequency to each side. */
const CLOSE_UP_SHARE = 0.05;
const CLOSE_UP_STEPS = 12;
