import * as steps from "~/db/steps.server";
import { usableBenches } from "../bench-sweeps.server.ts";

/** What the rows of a batch may name in a project, with row ids. */
export async function namedIn(projectId: number) {
  const [benches, found] = await Promise.all([usableBenches(projectId), steps.findAllByProject(projectId)]);
  return {
    benches: benches.map(({ bench: { id, publicId, name } }) => ({ id, publicId, name })),
    steps: found.map(({ step: { id, publicId, title, state } }) => ({ id, publicId, title, state })),
  };
}
