import type { ProjectAccess } from "~/auth/require.server";
import * as benches from "~/db/benches.server";
import { notFound, refused } from "~/errors";
import { mayEditBench, maySeeBench } from "~/services/bench-access.server";

/** The bench as this project may see it, or 404. */
export async function requireBench(access: ProjectAccess, publicId: string): Promise<benches.FoundBench> {
  const found = await benches.findByPublicId(publicId);
  if (!found || !(await maySeeBench(access, found.bench))) throw notFound("bench");
  return found;
}

/** The bench for someone who may change it, or 403. */
export async function requireOwnBench(access: ProjectAccess, publicId: string): Promise<benches.FoundBench> {
  const found = await requireBench(access, publicId);
  if (!mayEditBench(access, found.bench)) {
    const whose = found.owner
      ? `This bench is ${found.owner}’s own`
      : "This bench is kept in another project";
    throw refused(`${whose}, and is changed there. Nothing was changed.`);
  }
  return found;
}

/** The version with this public id, the newest where none is named, or 404. */
export function pickVersion(
  versions: readonly benches.ListedVersion[],
  publicId: string | null,
): benches.ListedVersion {
  const found = publicId ? versions.find(({ version }) => version.publicId === publicId) : versions[0];
  if (!found) throw notFound("version of this bench");
  return found;
}
