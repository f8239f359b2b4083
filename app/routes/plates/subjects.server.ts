import * as benches from "~/db/benches.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { formatFrequency } from "~/measurement/units";

/** What of a project can become a plate, for whoever came without saying what. */
export async function findSubjects(projectId: number) {
  const [page, found, own] = await Promise.all([
    sweeps.findAllByProject(projectId),
    trails.findAllByProject(projectId),
    benches.findAllByProject(projectId),
  ]);
  const read = page.rows.filter(({ pointCount }) => pointCount !== null);
  return {
    sweeps: read.map(({ publicId, title, takenAt }) => ({ publicId, title, takenAt })),
    trails: found.slice(0, MOST_TRAILS).map(({ publicId, name, frequencyHz }) => ({
      publicId,
      title: name || `The trail at ${formatFrequency(frequencyHz, null)}`,
    })),
    benches: own.map(({ bench }) => ({ publicId: bench.publicId, title: bench.name })),
  };
}

export type Subjects = Awaited<ReturnType<typeof findSubjects>>;

const MOST_TRAILS = 60;
