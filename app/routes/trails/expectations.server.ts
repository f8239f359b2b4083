import type { ListedStep } from "~/db/steps.server";
import { formatFrequency } from "~/measurement/units";

interface Came {
  frequencyHz: number;
  frequencyUncertaintyHz: number | null;
  at: Date | null;
  sweepId: number;
  sweepTitle: string;
}

/** Where steps should have put the trail, and where it came out. */
export function expectationsOf(trail: string, steps: readonly ListedStep[], stops: readonly Came[]) {
  return steps.flatMap(({ step }) =>
    step.expected
      .filter((place) => place.trail === trail)
      .map(({ frequencyHz, lowHz, highHz, how }) => {
        const came = step.state === "done" ? stopAfter(step, stops) : undefined;
        return {
          step: { publicId: step.publicId, title: step.title, planned: step.state === "planned" },
          frequencyHz,
          lowHz,
          highHz,
          frequency: formatFrequency(frequencyHz, halfOf(lowHz, highHz)),
          interval:
            lowHz !== null && highHz !== null
              ? `${formatFrequency(lowHz)} to ${formatFrequency(highHz)}`
              : null,
          how,
          came: came
            ? {
                frequency: formatFrequency(came.frequencyHz, came.frequencyUncertaintyHz),
                sweepTitle: came.sweepTitle,
              }
            : null,
          met: came ? isMet(came, lowHz, highHz) : null,
        };
      }),
  );
}

function stopAfter(step: ListedStep["step"], stops: readonly Came[]): Came | undefined {
  if (step.afterSweepId !== null) return stops.find(({ sweepId }) => sweepId === step.afterSweepId);
  const since = step.at ?? step.createdAt;
  return stops.find(({ at }) => at !== null && at > since);
}

/** Whether the two intervals meet; null where what was expected had none. */
function isMet(came: Came, lowHz: number | null, highHz: number | null): boolean | null {
  if (lowHz === null || highHz === null) return null;
  const half = came.frequencyUncertaintyHz ?? 0;
  return came.frequencyHz + half >= lowHz && came.frequencyHz - half <= highHz;
}

function halfOf(lowHz: number | null, highHz: number | null): number | null {
  return lowHz === null || highHz === null ? null : (highHz - lowHz) / 2;
}
