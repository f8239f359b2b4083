import { requireProject } from "~/auth/require.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { type TriedReading, tryReading } from "~/services/reading-preview.server";
import { getObject } from "~/services/storage.server";
import type { Route } from "./+types/reading-try";
import { givenFromForm, type ReadingFormErrors } from "./reading.schema";
import { requireSweep } from "./require-sweep.server";

export type TryAnswer =
  | { tried: TriedReading; errors?: undefined }
  | { tried?: undefined; errors: ReadingFormErrors };

/** Reads the original as the form says and keeps nothing: the curve of the reading page follows the choices. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.edit");
  const found = await requireSweep(access, args.params.sweep);
  const bytes = await getObject(found.file.storageKey);
  const current = found.reading?.reading;
  if (!current)
    return { errors: { form: "Nothing of this file was understood, so there is nothing to choose." } };
  const result = givenFromForm(await args.request.formData(), found.reading?.given ?? {}, current);
  if ("errors" in result) return { errors: result.errors } satisfies TryAnswer;
  const settings = found.analysis?.settings ?? DEFAULT_SETTINGS;
  return {
    tried: await tryReading({ name: found.file.name, bytes }, result.given, settings),
  } satisfies TryAnswer;
}
