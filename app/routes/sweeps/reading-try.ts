import { requireProject } from "~/auth/require.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { type TriedReading, tryReading } from "~/services/reading-preview.server";
import type { Route } from "./+types/reading-try";
import { readOriginal } from "./open-original.server";
import type { PictureFields } from "./picture.schema";
import { tryPictureForm } from "./picture-page.server";
import { givenFromForm, type ReadingFormErrors } from "./reading.schema";
import { requireSweep } from "./require-sweep.server";

export type TryAnswer =
  | { tried: TriedReading; fields?: PictureFields | null; errors?: undefined }
  | { tried?: undefined; fields?: undefined; errors: ReadingFormErrors };

/** Reads the original as the form says and keeps nothing: the curve of the reading page follows the choices. */
export async function action(args: Route.ActionArgs): Promise<TryAnswer> {
  const access = await requireProject(args, "sweep.edit");
  const found = await requireSweep(access, args.params.sweep);
  const current = found.reading?.reading;
  if (!current)
    return { errors: { form: "Nothing of this file was understood, so there is nothing to choose." } };
  const form = await args.request.formData();
  if (current.format === "screenshot") return (await tryPictureForm(found, form)) as TryAnswer;
  const bytes = await readOriginal(found.file.storageKey);
  const result = givenFromForm(form, found.reading?.given ?? {}, current);
  if ("errors" in result) return { errors: result.errors };
  const settings = found.analysis?.settings ?? DEFAULT_SETTINGS;
  return { tried: await tryReading({ name: found.file.name, bytes }, result.given, settings) };
}
