import { movementWords } from "~/charts/trail-words";
import type { Project } from "~/db/projects.server";
import * as trailStops from "~/db/trail-stops.server";
import * as trails from "~/db/trails.server";
import { formatFrequency, formatSwr } from "~/measurement/units";

/** The trails of a project in words: those seen in more than one sweep, and those that somebody named or judged. */
export async function loadTrailList(project: Project) {
  const [rows, all] = await Promise.all([
    trails.findAllByProject(project.id),
    trailStops.findAllByProject(project.id),
  ]);
  const byTrail = new Map<number, typeof all>();
  for (const stop of all) {
    const own = byTrail.get(stop.trailId);
    if (own) own.push(stop);
    else byTrail.set(stop.trailId, [stop]);
  }
  return rows
    .filter(
      ({ id, name, verdict }) => name !== "" || verdict !== "open" || (byTrail.get(id)?.length ?? 0) > 1,
    )
    .map(({ id, publicId, name, verdict, verdictText, frequencyHz }) => {
      const own = byTrail.get(id) ?? [];
      const [first, last] = [own[0], own[own.length - 1]];
      return {
        ...{ publicId, name, verdict, verdictText, frequencyHz },
        stops: own.length,
        frequency: last ? formatFrequency(last.frequencyHz, last.frequencyUncertaintyHz) : "in no sweep now",
        swr: last
          ? formatSwr(last.minimumSwr ?? Number.POSITIVE_INFINITY, last.minimumSwrLow, last.minimumSwrHigh)
          : "",
        lastSeen: last?.sweepTitle ?? "",
        movement: first && last ? movementWords(first, last) : "",
      };
    });
}
