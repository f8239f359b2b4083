import type * as trailStops from "~/db/trail-stops.server";
import type { Dip } from "~/measurement/sweep";
import { combine } from "~/measurement/uncertainty";
import { formatFrequency, formatSwr, formatWidth } from "~/measurement/units";

type Stop = Omit<Awaited<ReturnType<typeof trailStops.findAllByTrail>>[number], "numbers"> & { numbers: Dip };

/** A trail's stops as they are read, oldest first, each with its movement since the one before. */
export function wayOf(stops: readonly Stop[]) {
  return stops.map((stop, i) => {
    const { bandwidth } = stop.numbers;
    return {
      publicId: stop.publicId,
      sweep: { publicId: stop.sweepPublicId, title: stop.sweepTitle, takenAt: stop.at },
      frequencyHz: stop.frequencyHz,
      uncertaintyHz: stop.frequencyUncertaintyHz,
      frequency: formatFrequency(stop.frequencyHz, stop.frequencyUncertaintyHz),
      uncertainty:
        stop.frequencyUncertaintyHz === null ? "unknown" : formatWidth(stop.frequencyUncertaintyHz),
      swr: formatSwr(stop.minimumSwr ?? Number.POSITIVE_INFINITY, stop.minimumSwrLow, stop.minimumSwrHigh),
      width: bandwidth
        ? `${bandwidth.open ? "at least " : ""}${formatWidth(bandwidth.widthHz, bandwidth.widthUncertaintyHz)}`
        : "none",
      widthUncertainty:
        bandwidth && !bandwidth.open && bandwidth.widthUncertaintyHz !== null
          ? formatWidth(bandwidth.widthUncertaintyHz)
          : null,
      limitSwr: bandwidth?.limitSwr ?? null,
      moved: i > 0 ? movementOf(stops[i - 1], stop) : null,
      noteCount: stop.noteCount,
    };
  });
}

export interface Moved {
  words: string;
  beyond: boolean | null;
}

function movementOf(from: Stop, to: Stop): Moved {
  const byHz = to.frequencyHz - from.frequencyHz;
  const uncertaintyHz = combine(from.frequencyUncertaintyHz, to.frequencyUncertaintyHz);
  const sign = byHz < 0 ? "−" : "+";
  const by = `${sign}${formatWidth(Math.abs(byHz), uncertaintyHz)}`;
  if (uncertaintyHz === null) return { words: `${by}, limits unknown`, beyond: null };
  return { words: `${by} ± ${formatWidth(uncertaintyHz)}`, beyond: Math.abs(byHz) > uncertaintyHz };
}
