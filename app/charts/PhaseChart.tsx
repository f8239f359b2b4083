import { useMemo } from "react";
import type { FrequencyScale } from "./axis";
import { FrequencyLines } from "./FrequencyLines";
import { degreeAxis } from "./impedance-axis";

export interface PhaseChartProps {
  frequencyHz: ArrayLike<number>;
  /** Without jumps. */
  phaseDeg: ArrayLike<number>;
  scale: FrequencyScale;
  marksHz: readonly number[];
  label: string;
}

const HEIGHT_PX = 130;

/** The angle of Γ over frequency, without jumps. */
export function PhaseChart({ phaseDeg, ...rest }: PhaseChartProps) {
  const { yOf, ticks, lines } = useMemo(() => {
    const lines = [{ name: "Angle of Γ, without jumps", values: phaseDeg, colour: "ink" }] as const;
    return { ...degreeAxis([phaseDeg], HEIGHT_PX), lines };
  }, [phaseDeg]);
  return <FrequencyLines {...rest} {...{ lines, yOf, ticks }} heightPx={HEIGHT_PX} />;
}
