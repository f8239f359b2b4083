import { requireProject } from "~/auth/require.server";
import { brokenForm, refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { log } from "~/services/log.server";
import { parseForm } from "~/services/parse-form";
import { addPhotograph, changeCaption, deletePhotograph } from "~/services/photographs.server";
import type { Route } from "./+types/photographs";
import { photographsSchema } from "./photographs.schema";
import { type PhotographPlace, requirePhotograph, requirePhotographPlace } from "./place.server";

/** The forms of `<Photographs>`: each answers on the page that shows them. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "project.read");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const form = await args.request.formData().catch(() => {
    throw brokenForm();
  });
  const submission = parseForm(form, { schema: photographsSchema });
  if (submission.status !== "success") throw brokenForm();
  const value = submission.value;
  switch (value.intent) {
    case "add": {
      const place = await requirePhotographPlace(access, value);
      const files = form
        .getAll("photographs")
        .filter((entry): entry is File => entry instanceof File && entry.name !== "");
      const said: string[] = [];
      for (const file of files.slice(0, MOST_AT_ONCE)) {
        const refusal = await addOne(place, { project, person }, file, value.caption);
        if (refusal) said.push(`“${file.name}” was not taken. ${refusal}`);
      }
      const added = Math.min(files.length, MOST_AT_ONCE) - said.length;
      if (files.length > MOST_AT_ONCE) {
        said.push(`At most ${MOST_AT_ONCE} go at once; send the others in the next go.`);
      }
      return back(place, [addedWords(added, files.length), ...said].join(" "));
    }
    case "caption": {
      const { photograph, place } = await requirePhotograph(access, value.photograph);
      await changeCaption(photograph, value.caption);
      return back(place, "The caption was kept.");
    }
    case "delete": {
      const { photograph, place } = await requirePhotograph(access, value.photograph);
      await deletePhotograph(photograph, person);
      return back(place, "The photograph was deleted with its original.");
    }
    default:
      return value satisfies never;
  }
}

async function addOne(
  { of }: PhotographPlace,
  { project, person }: { project: { publicId: string }; person: { id: number } },
  file: File,
  caption: string,
): Promise<string | null> {
  try {
    const bytes = new Uint8Array(await file.arrayBuffer());
    const added = await addPhotograph({
      of,
      project,
      by: person,
      file: { name: file.name, bytes },
      caption,
    });
    return added.kind === "added" ? null : added.message;
  } catch (error) {
    log.error({ err: error, name: file.name }, "a photograph could not be taken in");
    return "Something failed here, and nothing of it was kept; send it again.";
  }
}

function addedWords(added: number, given: number): string {
  if (given === 0) return "No photograph was chosen. Nothing was stored.";
  if (added === 0) return "";
  return added === 1 ? "The photograph was added." : `${added} photographs were added.`;
}

function back({ page }: PhotographPlace, message: string) {
  return redirectWithMessage(`${page}#photographs`, message.trim());
}

const MOST_AT_ONCE = 12;
