import type { ProjectAccess } from "~/auth/require.server";
import { packPoints } from "~/charts/sent-points";
import * as repeats from "~/db/repeats.server";
import type { FoundSweep } from "~/db/sweeps.server";
import { findRepeats } from "~/services/repeat-findings.server";

/** The group of a sweep with what is found in it, and the sweeps that could join. */
export async function loadRepeats({ project, may }: ProjectAccess, { sweep }: FoundSweep) {
  const [group, all] = await Promise.all([
    sweep.repeatGroup ? repeats.findGroup(project.id, sweep.repeatGroup) : [],
    may("sweep.edit") ? repeats.findCandidates(project.id, sweep.id) : [],
  ]);
  const members = group.length > 1 ? group : [];
  return {
    group: members.map((one) => ({
      publicId: one.sweep.publicId,
      title: one.sweep.title,
      takenAt: one.sweep.takenAt,
    })),
    candidates: all
      .filter((one) => overlaps(one, sweep) && !members.some((m) => m.sweep.publicId === one.publicId))
      .map(({ publicId, title, takenAt }) => ({ publicId, title, takenAt })),
    findings: members.length > 1 ? await findingsOf(members) : null,
  };
}
export type RepeatsData = Awaited<ReturnType<typeof loadRepeats>>;

async function findingsOf(members: FoundSweep[]) {
  const { mean, ...findings } = await findRepeats(members);
  if (!mean) return { ...findings, mean: null };
  const { sweep, limits, ...rest } = mean;
  return { ...findings, mean: { ...rest, points: packPoints(sweep, { limits }) } };
}

type Span = { startHz: number | null; stopHz: number | null };

function overlaps(one: Span, other: Span): boolean {
  if (one.startHz === null || one.stopHz === null || other.startHz === null || other.stopHz === null)
    return false;
  return one.startHz < other.stopHz && other.startHz < one.stopHz;
}
