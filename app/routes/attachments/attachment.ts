import { requireProject } from "~/auth/require.server";
import { notFound } from "~/errors";
import type { AttachmentSize } from "~/services/attachments.server";
import { attachment as download } from "~/services/file-names";
import type { Route } from "./+types/attachment";
import { bytesOf, requireAttachment } from "./require-attachment.server.ts";

/**
 * A file of a note: `file` as a download, of a picture its copies `small` and `shown`. The original of a picture says where
 * and with what it was taken: it is for whoever gave it, others get the copy.
 */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const size = SIZES.find((known) => known === args.params.size);
  const { attachment, own } = await requireAttachment(access, args.params.attachment);
  const isPicture = attachment.shownKey !== null;
  if (!size || (size !== "file" && !isPicture)) throw notFound("file");
  const copy = isPicture && !(size === "file" && own);
  const bytes = await bytesOf(attachment, copy && size === "file" ? "shown" : size);
  const name = copy ? `${attachment.name.replace(/\.[^.]+$/, "")}.jpg` : attachment.name;
  return new Response(new Uint8Array(bytes), {
    headers: {
      "Content-Type": copy ? "image/jpeg" : "application/octet-stream",
      "Content-Length": String(bytes.length),
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, max-age=600",
      ...(size === "file" && { "Content-Disposition": download(name) }),
    },
  });
}

const SIZES: readonly AttachmentSize[] = ["small", "shown", "file"];
