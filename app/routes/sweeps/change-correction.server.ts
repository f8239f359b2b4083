import { z } from "zod";
import * as cables from "~/db/cables.server";
import type { FoundSweep } from "~/db/sweeps.server";
import { usableBenchId } from "~/services/bench-sweeps.server";
import { redirectWithMessage } from "~/services/flash.server";
import { analyseAnew, chooseBench, chooseFeedline } from "~/services/sweep-edits.server";
import { feedlineFrom, feedlineSchema } from "./feedline.schema";
import { formErrors } from "./form-errors";

/** The forms about a sweep's bench and feedline. */
export async function changeCorrection(
  intent: "bench" | "feedline" | "no-feedline" | "anew",
  form: FormData,
  found: FoundSweep,
  projectId: number,
  by: number,
  here: string,
) {
  switch (intent) {
    case "bench": {
      const publicId = String(form.get("bench") ?? "");
      const benchId = publicId ? await usableBenchId(publicId, projectId) : null;
      if (benchId === undefined) {
        return formErrors(["There is no such bench that can be used here. Nothing was changed."]);
      }
      await chooseBench(found, benchId, by);
      return redirectWithMessage(
        here,
        benchId === null
          ? "The sweep is as it was measured again, without a bench."
          : "The sweep was analysed anew with that bench.",
      );
    }
    case "feedline": {
      const parsed = feedlineSchema.safeParse(Object.fromEntries(form));
      if (!parsed.success) {
        const fields: Record<string, string[]> = z.flattenError(parsed.error).fieldErrors;
        const errors = [`The feedline was not taken over. ${Object.values(fields).flat().join(" ")}`];
        return formErrors(errors, 400, fields);
      }
      const line = feedlineFrom(parsed.data, await cables.findAllByProject(projectId));
      if (!line) return formErrors(["There is no such cable any more. Nothing was changed."]);
      const kept = await chooseFeedline(found, line, by);
      return redirectWithMessage(
        kept ? here : `${here}?plane=antenna`,
        kept
          ? "Analysed anew at the antenna."
          : "This is the sweep with the feedline taken away. It is tried: keep it, or go back.",
      );
    }
    case "no-feedline":
      await chooseFeedline(found, null, by);
      return redirectWithMessage(here, "The sweep has no feedline now.");
    case "anew":
      await analyseAnew(found, by);
      return redirectWithMessage(here, "Analysed anew with the bench as it is now.");
    default:
      return intent satisfies never;
  }
}
