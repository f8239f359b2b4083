import * as benches from "~/db/benches.server";
import * as dips from "~/db/dips.server";
import type { FollowKind, Subject } from "~/db/follows.server";
import * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { formatFrequency } from "~/measurement/units";

export interface NamedSubject extends Subject {
  title: string;
  path: string;
}

/** What can be followed in this project, with its name; undefined for what is not there. */
export async function findSubject(
  project: { id: number; publicId: string; title: string },
  kind: FollowKind,
  id: string | undefined,
): Promise<NamedSubject | undefined> {
  const base = `/projects/${project.publicId}`;
  if (kind === "project") return { kind, id: project.publicId, title: project.title, path: base };
  const found = id ? await FINDERS[kind](id) : undefined;
  if (!id || !found || found.projectId !== project.id) return undefined;
  return { kind, id, title: found.title, path: `${base}/${PATHS[kind]}/${id}` };
}

type Finder = (id: string) => Promise<{ projectId: number; title: string } | undefined>;

const FINDERS: Record<Exclude<FollowKind, "project">, Finder> = {
  dip: async (id) => {
    const found = await dips.findByPublicId(id);
    return (
      found && {
        projectId: found.dip.projectId,
        title: `The dip at ${formatFrequency(found.dip.frequencyHz, found.dip.numbers.frequencyUncertaintyHz)}`,
      }
    );
  },
  trail: async (id) => {
    const trail = (await trails.findByPublicId(id))?.trail;
    const title = trail && (trail.name || `The trail at ${formatFrequency(trail.frequencyHz, null)}`);
    return trail && title ? { projectId: trail.projectId, title } : undefined;
  },
  sweep: async (id) => (await sweeps.findByPublicId(id))?.sweep,
  step: async (id) => (await steps.findByPublicId(id))?.step,
  bench: async (id) => {
    const bench = (await benches.findByPublicId(id))?.bench;
    return bench && { projectId: bench.projectId, title: bench.name };
  },
};

const PATHS = { dip: "dips", trail: "trails", sweep: "sweeps", step: "steps", bench: "benches" };
