import type { FoundSweep } from "~/db/sweeps.server";
import { type SweepAt, sweepAt } from "./shown-sweep.server.ts";

/** What repeats of one thing say together. */
export async function findRepeats(members: FoundSweep[]) {
  const at = (await Promise.all(members.map((found) => sweepAt(found)))).filter(
    (one): one is SweepAt => one !== null,
  );
  const planes = new Set(at.map(({ correction }) => correction?.plane ?? "instrument"));
  return { count: at.length, planes: [...planes] };
}

export type RepeatFindingsData = Awaited<ReturnType<typeof findRepeats>>;
