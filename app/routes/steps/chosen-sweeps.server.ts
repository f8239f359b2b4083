import * as steps from "~/db/steps.server";

interface Chosen {
  beforeSweepId: number | null;
  afterSweepId: number | null;
  problem: string | null;
}

/** The sweeps that a form names, or null where one is not of the project; an empty name is for the dates to say. */
export async function chosenSweeps(
  projectId: number,
  { before, after }: { before?: string; after?: string },
): Promise<Chosen | null> {
  const sweeps = await steps.findSweepsInOrder(projectId);
  const idOf = (publicId: string | undefined) =>
    publicId ? sweeps.find((sweep) => sweep.publicId === publicId)?.id : null;
  const [beforeSweepId, afterSweepId] = [idOf(before), idOf(after)];
  if (beforeSweepId === undefined || afterSweepId === undefined) return null;
  const same = beforeSweepId !== null && beforeSweepId === afterSweepId;
  return { beforeSweepId, afterSweepId, problem: same ? SAME : null };
}

const SAME = "Before and after are the same sweep. Nothing was kept.";
