import * as dips from "~/db/dips.server";
import * as sweeps from "~/db/sweeps.server";
import { sweepAt } from "~/services/shown-sweep.server";
import type { Stage } from "./stage.ts";

/** Reads off what the pages show of a sweep, so that the story tells the same numbers. Answers its row id. */
export async function tellSweep(key: string, publicId: string, stage: Stage): Promise<number> {
  const found = await sweeps.findByPublicId(publicId);
  const shown = found && (await sweepAt(found));
  if (!found || !shown) throw new Error(`The demo's sweep ${key} is not there.`);
  const known = await dips.findAllBySweep(found.sweep.id);
  stage.sweepIds.set(key, found.sweep.id);
  stage.told.add(key, {
    publicId,
    path: `/projects/${stage.project.publicId}/sweeps/${publicId}`,
    title: found.sweep.title,
    dips: known
      .filter(({ dip }) => dip.present)
      .map(({ dip }) => ({ publicId: dip.publicId, id: dip.id, numbers: dip.numbers })),
    points: shown.sweep,
  });
  return found.sweep.id;
}
