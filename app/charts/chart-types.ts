/** What the drawings are given. */
import type { Dip } from "../measurement/sweep.ts";
import type { FrequencyScaleKind } from "./axis.ts";
import type { ChartQuantity } from "./value-axis.ts";

export type VerdictState = "open" | "proposed" | "settled";

export interface ChartDip extends Dip {
  id: string;
  noteCount: number;
  verdict: VerdictState;
  /** The accepted or proposed explanation in a few words. */
  verdictText: string | null;
  /** First line of the latest note, plain text. */
  latestNote: string | null;
  /** Null while the antenna has no design bands. */
  inDesignBand: boolean | null;
}

export interface ChartBand {
  name: string;
  lowHz: number;
  highHz: number;
}

export interface ChartView {
  quantity: ChartQuantity;
  scale: FrequencyScaleKind;
  fromHz: number;
  toHz: number;
}
