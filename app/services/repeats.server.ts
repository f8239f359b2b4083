import { inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as projects from "~/db/projects.server";
import * as repeats from "~/db/repeats.server";
import { record } from "./events.server.ts";

/**
 * Says that these sweeps are of one and the same thing. Groups that some of them are in already become one. Answers
 * false, with nothing changed, where fewer than two of them are there and read.
 */
export function groupRepeats(
  projectId: number,
  publicIds: string[],
  by: number | null = null,
): Promise<boolean> {
  return inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    const chosen = await repeats.lockAll(projectId, [...new Set(publicIds)], tx);
    if (chosen.length < 2) return false;
    const known = [...new Set(chosen.flatMap(({ repeatGroup }) => repeatGroup ?? []))];
    const joined = await Promise.all(known.map((group) => repeats.findIdsOfGroup(projectId, group, tx)));
    const ids = [...new Set([...chosen.map(({ id }) => id), ...joined.flat()])];
    await repeats.setGroup(ids, known[0] ?? newPublicId(), tx);
    const about = { sweep: publicIds[0], title: `${ids.length} sweeps are repeats of one another` };
    await record({ projectId, kind: "sweep.edited", actorId: by, about }, tx);
    return true;
  });
}

/** Takes a sweep out of its group; one that would be left alone is no repeat either. */
export function leaveRepeats(
  sweep: { id: number; publicId: string; title: string; projectId: number; repeatGroup: string | null },
  by: number | null = null,
): Promise<void> {
  return inTransaction(async (tx) => {
    if (sweep.repeatGroup === null) return;
    await projects.lock(sweep.projectId, tx);
    const ids = await repeats.findIdsOfGroup(sweep.projectId, sweep.repeatGroup, tx);
    await repeats.setGroup(ids.length <= 2 ? ids : [sweep.id], null, tx);
    const about = { sweep: sweep.publicId, title: sweep.title };
    await record({ projectId: sweep.projectId, kind: "sweep.edited", actorId: by, about }, tx);
  });
}
