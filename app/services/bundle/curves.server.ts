import type { KindName } from "~/db/bundle-kinds.server";
import * as rows from "~/db/bundle-rows.server";
import type { Queryable } from "~/db/client.server";
import { decodePoints } from "../points.server.ts";
import { sweepFigure } from "./figure.ts";
import { type PlanLine, textEntry } from "./plan.ts";
import type { Rec } from "./records.ts";

/** What the records of the project told. */
interface Known {
  ids: ReadonlyMap<KindName, rows.PublicIds>;
  shown: ReadonlyMap<string, Rec[]>;
  tx: Queryable;
}

/** The curves that the dips were found in: as numbers, and drawn. */
export async function* planCurves(context: Known, figures: Set<string>): AsyncGenerator<PlanLine> {
  const ids = [...(context.ids.get("sweeps") ?? new Map<number, string>())];
  const dips = context.shown.get("dips") ?? [];
  const titles = new Map(
    context.shown.get("sweeps")?.map((sweep) => [String(sweep.id), String(sweep.title)]),
  );
  const withPreview = new Set(
    context.shown.get("sweeps")?.flatMap((sweep) => (sweep.previewPath ? [String(sweep.id)] : [])),
  );
  const hzOf = new Map<string, number[]>();
  for (const dip of dips) {
    if (!dip.present) continue;
    const sweep = String(dip.sweep);
    const hz = hzOf.get(sweep);
    if (hz) hz.push(Number(dip.frequencyHz));
    else hzOf.set(sweep, [Number(dip.frequencyHz)]);
  }
  for (let i = 0; i < ids.length; i += FEW) {
    const batch = ids.slice(i, i + FEW);
    const found = await rows.findPreviews(
      batch.map(([id]) => id),
      context.tx,
    );
    for (const { id, preview } of found) {
      const sweep = context.ids.get("sweeps")?.get(id) ?? "";
      if (!preview || !withPreview.has(sweep)) continue;
      yield { path: previewPath(sweep), from: "preview", preview: preview.toString("base64") };
      figures.add(sweep);
      const drawn = sweepFigure(decodePoints([preview]), hzOf.get(sweep) ?? [], titles.get(sweep) ?? "");
      yield* textEntry(`data/figures/${sweep}.svg`, drawn);
    }
  }
}

export function previewPath(sweep: unknown): string {
  return `data/points/${sweep}-shown.csv`;
}

const FEW = 20;
