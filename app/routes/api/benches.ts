import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeBench } from "./story-shapes.server.ts";

/** The benches that are kept in a project, with every version and its references. */
const handle = endpoint({
  GET: async (call) => {
    const { project } = await requireApiProject(call, "project.read");
    const rows = await benches.findAllByProject(project.id);
    const versions = await Promise.all(rows.map(({ bench }) => benches.findVersions(bench.id)));
    const ids = versions.flat().map(({ version }) => version.id);
    const references = await benchReferences.findAllByVersions(ids);
    return Response.json({
      items: rows.map((row, i) => shapeBench(row, versions[i], references, project.publicId)),
    });
  },
});

export const loader = handle;
export const action = handle;
