import { z } from "zod";
import { LICENCE_IDS, type LicenceId } from "./licences.ts";

/** What whoever makes a plate chooses. Pure. */

export const plateChoices = z.object({
  title: z.string().trim().min(1).max(160),
  /** Markdown. */
  caption: z.string().trim().max(2000),
  licence: z.enum(LICENCE_IDS),
  /** Hz; null for the end of what there is. */
  fromHz: z.number().nonnegative().nullable(),
  toHz: z.number().positive().nullable(),
  scale: z.enum(["linear", "log"]),
  quantity: z.enum(["return-loss", "swr"]),
  showBands: z.boolean(),
  showDips: z.boolean(),
  showLimits: z.boolean(),
  /** The plate's number and title in the figure itself. */
  showTitle: z.boolean(),
  /** Other names for sweeps, dips and trails, by public id. */
  labels: z.record(z.string(), z.string().trim().max(80)),
});
export type PlateChoices = z.infer<typeof plateChoices>;

/** What is proposed; `span` is the whole of what would be drawn, Hz. */
export function defaultsFor(of: {
  title: string;
  licence?: LicenceId;
  span?: { fromHz: number; toHz: number };
}): PlateChoices {
  const { span } = of;
  const wide = span !== undefined && span.fromHz > 0 && span.toHz / span.fromHz > LOG_FROM_RATIO;
  return {
    title: of.title,
    caption: "",
    licence: of.licence ?? "CC-BY-4.0",
    fromHz: null,
    toHz: null,
    scale: wide ? "log" : "linear",
    quantity: "return-loss",
    showBands: true,
    showDips: true,
    showLimits: true,
    showTitle: true,
    labels: {},
  };
}

/** Beyond some four octaves the low end can't be read on a linear axis. */
const LOG_FROM_RATIO = 16;
