import type { ProjectAccess } from "~/auth/require.server";
import { notFound } from "~/errors";
import { findOf } from "~/services/write-ups/drafts.server";

/** The write-up at `:writeUp` of this project, or 404. */
export async function requireWriteUp(access: ProjectAccess, publicId: string | undefined) {
  const found = await findOf(access, publicId);
  if (!found) throw notFound("write-up");
  return found;
}
