import type { FrequencyUnit } from "../measurement/sweep.ts";

export const UNIT_HZ: Record<FrequencyUnit, number> = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 };
