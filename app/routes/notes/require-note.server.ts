import * as notes from "~/db/notes.server";
import { notFound } from "~/errors";

/** A note of this project, also a removed one, or 404. */
export async function findNote(projectId: number, publicId: string) {
  const found = await notes.findByPublicId(publicId);
  if (!found || found.note.projectId !== projectId) throw notFound("note");
  return found;
}

/** A note of this project that can be read, or 404. */
export async function requireNote(projectId: number, publicId: string) {
  const found = await findNote(projectId, publicId);
  if (found.note.removedAt) throw notFound("note");
  return found;
}
