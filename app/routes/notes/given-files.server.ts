import { addAttachment, type NewAttachment } from "~/services/attachments.server";
import { log } from "~/services/log.server";

export interface GivenFiles {
  /** What names them in the note's text, each by itself. */
  markdown: string[];
  /** Of each that was not taken, why. */
  refusals: string[];
}

/** Takes the files that a note's form holds where no script sent them before; they leave the form. */
export async function takeGivenFiles(
  form: FormData,
  { project, by }: Pick<NewAttachment, "project" | "by">,
): Promise<GivenFiles> {
  const given = form.getAll("file").filter((entry) => entry instanceof File && entry.name !== "") as File[];
  form.delete("file");
  const taken: GivenFiles = { markdown: [], refusals: [] };
  for (const [i, file] of given.entries()) {
    const message = i < MOST_AT_ONCE ? await takeOne(file, project, by, taken.markdown) : TOO_MANY;
    if (message) taken.refusals.push(`“${file.name}” was not taken. ${message}`);
  }
  return taken;
}

async function takeOne(
  file: File,
  project: NewAttachment["project"],
  by: NewAttachment["by"],
  markdown: string[],
): Promise<string | null> {
  try {
    const bytes = new Uint8Array(await file.arrayBuffer());
    const added = await addAttachment({ project, by, file: { name: file.name, bytes } });
    if (added.kind === "refused") return added.message;
    markdown.push(added.markdown);
    return null;
  } catch (error) {
    log.error({ err: error, name: file.name }, "a file for a note could not be taken in");
    return "Something failed here, and nothing of it was kept; send it again.";
  }
}

const MOST_AT_ONCE = 12;
const TOO_MANY = `At most ${MOST_AT_ONCE} go at once; send the others with another note.`;
