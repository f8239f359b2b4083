import * as readings from "~/db/readings.server";
import type { FoundSweep } from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { keepPicture, tryPicture } from "~/services/picture-readings.server";
import { choicesFrom, fieldsOf, type PictureErrors } from "./picture.schema";

/** What the reading page of a picture shows: its stored reading tried once more, without reading print again. */
export async function loadPictureReading(found: FoundSweep) {
  const spec = found.reading?.reading?.spec.screenshot ?? {};
  const [stored, zeroLines] = await Promise.all([
    tryPicture(found, { spec, zeroAtCrest: false }, found.analysis?.settings ?? DEFAULT_SETTINGS),
    readings.findZeroLines(found.sweep.projectId, found.sweep.id),
  ]);
  return {
    stored,
    fields: fieldsOf(spec, stored.picture?.corners ?? null),
    notes: found.reading?.reading?.picture ?? null,
    assumed: found.reading?.reading?.assumed ?? [],
    zeroLines,
  };
}

export type PictureReadingData = Awaited<ReturnType<typeof loadPictureReading>>;

/** Tries the choices of a form; with `print` the axes are read from the picture and come back as fields. */
export async function tryPictureForm(found: FoundSweep, form: FormData) {
  const result = choicesFrom(Object.fromEntries(form), found.reading?.reading?.spec.screenshot ?? {});
  if ("errors" in result) return { errors: result.errors };
  const print = form.get("intent") === "print";
  const settings = found.analysis?.settings ?? DEFAULT_SETTINGS;
  const tried = await tryPicture(found, result.choices, settings, print);
  const spec = tried.reading?.spec.screenshot;
  return { tried, fields: print && spec ? fieldsOf({ ...result.choices.spec, ...spec }) : null };
}

/** Keeps the choices of a form as the reading; the errors where it gives no sweep. */
export async function keepPictureForm(
  found: FoundSweep,
  form: FormData,
  by: number,
): Promise<PictureErrors | null> {
  const result = choicesFrom(Object.fromEntries(form), found.reading?.reading?.spec.screenshot ?? {});
  if ("errors" in result) return result.errors;
  const problem = await keepPicture(found, result.choices, found.analysis?.settings ?? DEFAULT_SETTINGS, by);
  return problem && { form: `${problem.message} The reading was left as it was.` };
}
