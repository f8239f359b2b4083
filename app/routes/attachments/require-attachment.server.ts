import type { ProjectAccess } from "~/auth/require.server";
import * as attachments from "~/db/attachments.server";
import { notFound, unavailable } from "~/errors";
import { type AttachmentSize, readAttachment } from "~/services/attachments.server";
import { log } from "~/services/log.server";

/** A file of a note that is there, or one of the person's own that is not sent yet; else 404. */
export async function requireAttachment({ project, person }: ProjectAccess, publicId: string) {
  const found = await attachments.findByPublicId(publicId);
  if (!found || found.attachment.projectId !== project.id) throw notFound("file");
  const { attachment, note } = found;
  const own = attachment.uploadedBy !== null && attachment.uploadedBy === person?.id;
  const there = attachment.noteId === null ? own : !note?.removedAt;
  if (!there) throw notFound("file");
  return { attachment, own };
}

export async function bytesOf(row: attachments.AttachmentRow, size: AttachmentSize): Promise<Uint8Array> {
  return readAttachment(row, size).catch((error) => {
    log.error({ err: error }, "a file of a note could not be fetched from the store");
    throw unavailable(
      "The file can't be fetched just now",
      "The store of files does not answer. The file is safe there. Try again in a minute.",
    );
  });
}
