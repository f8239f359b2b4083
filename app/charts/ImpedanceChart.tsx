import { useMemo } from "react";
import type { FrequencyScale } from "./axis";
import { FrequencyLines } from "./FrequencyLines";
import { ohmAxis } from "./impedance-axis";

export interface ImpedanceChartProps {
  frequencyHz: ArrayLike<number>;
  resistanceOhm: ArrayLike<number>;
  reactanceOhm: ArrayLike<number>;
  referenceOhm: number;
  scale: FrequencyScale;
  marksHz: readonly number[];
  label: string;
}

const HEIGHT_PX = 220;

/** R and X over frequency. */
export function ImpedanceChart({ resistanceOhm, reactanceOhm, referenceOhm, ...rest }: ImpedanceChartProps) {
  const { yOf, ticks, lines } = useMemo(() => {
    const axis = ohmAxis([resistanceOhm, reactanceOhm], referenceOhm, HEIGHT_PX);
    const lines = [
      { name: "R, resistance", values: resistanceOhm, colour: "ink" },
      { name: "X, reactance", values: reactanceOhm, colour: "fen", dash: "7 4" },
    ] as const;
    return { ...axis, lines };
  }, [resistanceOhm, reactanceOhm, referenceOhm]);
  return <FrequencyLines {...rest} {...{ lines, yOf, ticks }} heightPx={HEIGHT_PX} />;
}
