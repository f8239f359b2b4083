import type { ProjectAccess } from "~/auth/require.server";
import * as trails from "~/db/trails.server";
import { formatFrequency } from "~/measurement/units";

/** The trail that a dip is on, and the others that it might be on by right. */
export async function loadTrailOfDip({ project, may }: ProjectAccess, dip: { id: number }) {
  const mayCorrect = may("trail.correct");
  const [own, all] = await Promise.all([
    trails.findByDip(dip.id),
    mayCorrect ? trails.findAllByProject(project.id) : [],
  ]);
  return {
    own: own ? { publicId: own.publicId, label: own.name || formatFrequency(own.frequencyHz) } : null,
    mayCorrect,
    others: all
      .filter(({ id }) => id !== own?.id)
      .map(({ publicId, name, frequencyHz }) => ({ publicId, label: name || formatFrequency(frequencyHz) })),
  };
}

export type TrailOfDipData = Awaited<ReturnType<typeof loadTrailOfDip>>;
