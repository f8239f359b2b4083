import { requireProject } from "~/auth/require.server";
import { refused } from "~/errors";
import { addAttachment } from "~/services/attachments.server";
import { log } from "~/services/log.server";
import type { Route } from "./+types/attachments";

/** Takes one file (`file`) in for a note that is being written; answers what names it there, or why it was not taken. */
export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "note.write");
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const form = await args.request.formData().catch(() => null);
  const file = form?.get("file");
  if (!(file instanceof File)) return Response.json({ message: CUT_SHORT }, { status: 400 });
  try {
    const bytes = new Uint8Array(await file.arrayBuffer());
    const added = await addAttachment({ project, by: person, file: { name: file.name, bytes } });
    if (added.kind === "refused") return Response.json({ message: added.message }, { status: 422 });
    return Response.json({ publicId: added.publicId, markdown: added.markdown });
  } catch (error) {
    log.error({ err: error, name: file.name }, "a file for a note could not be taken in");
    return Response.json({ message: FAILED }, { status: 500 });
  }
}

const CUT_SHORT = "The file was cut short on its way. Nothing of it was kept; send it again.";
const FAILED = "Something failed here, and nothing of it was kept; send it again.";
