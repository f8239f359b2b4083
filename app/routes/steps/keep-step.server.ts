import { data } from "react-router";
import type { ProjectAccess } from "~/auth/require.server";
import type * as steps from "~/db/steps.server";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { antennaAt } from "~/services/antennas.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseWas } from "~/services/merge-edit";
import { parseForm } from "~/services/parse-form";
import { expectedAfter } from "~/services/step-expectations.server";
import { changeStep, makeStep, type StepWas } from "~/services/steps.server";
import { stepConflict } from "./step-conflict";
import { quantitiesFrom, sentStep, textsOf } from "./step-form";
import { stepSchema } from "./steps.schema";

/** The form of a step, new or known: kept, or answered with what stands in the way and all that was typed. */
export async function keepStep(access: ProjectAccess, form: FormData, step: steps.StepRow | null) {
  const { project, person } = access;
  const unit = lengthUnitOf(person);
  const submission = parseForm(form, { schema: stepSchema(unit) });
  const sent = sentStep(submission.payload);
  if (form.get("intent") === "another") return data({ sent, errors: {}, more: true });
  if (submission.status !== "success") {
    return data({ sent, errors: submission.error ?? {} }, { status: 400 });
  }
  const { value } = submission;
  const then = await antennaAt(project.id, value.at ?? new Date());
  const antenna = then.kind === "described" ? then.version.content : null;
  const values = {
    title: value.title,
    body: value.body,
    state: value.state,
    at: step?.at && minuteOf(step.at) === minuteOf(value.at) ? step.at : value.at,
    quantities: quantitiesFrom(value.quantities, antenna, unit, step?.quantities),
  };
  const actor = { projectId: project.id, by: person?.id ?? null };
  const expected =
    values.state === "planned" ? await expectedAfter(project.id, values.quantities, unit) : undefined;
  const result = step
    ? await changeStep(step.id, actor, parseWas<StepWas>(value.was), values, expected)
    : await makeStep(actor, values, expected);
  switch (result.kind) {
    case "problem": {
      const { index, message } = result.problem;
      // Empty rows are no quantities: the place in the form is that of the n-th row that says something.
      const places = value.quantities.length === sent.quantities.length ? null : placesOf(sent.quantities);
      const errors = { [`quantities[${places?.[index] ?? index}].target`]: [message] };
      return data({ sent, errors }, { status: 400 });
    }
    case "conflict": {
      const theirs = textsOf(result.stored, unit);
      const conflict = stepConflict({ ...result, sent, theirs, confirmed: value.confirm !== undefined });
      return data({ sent, errors: {}, conflict }, { status: 409 });
    }
    case "gone":
      return redirectWithMessage(
        `/projects/${project.publicId}/steps`,
        "Somebody deleted this step in the meantime. Nothing was kept.",
      );
    case "kept": {
      const publicId = "publicId" in result ? result.publicId : step?.publicId;
      return redirectWithMessage(
        `/projects/${project.publicId}/steps/${publicId}`,
        step ? "The step was changed." : wordsFor(values.state),
      );
    }
  }
}

function wordsFor(state: "planned" | "done"): string {
  return state === "planned" ? "The step is planned. Mark it done once it is." : "The step was written down.";
}

function placesOf(rows: Partial<Record<string, string>>[]): number[] {
  return [...rows.keys()].filter((i) =>
    ["target", "label", "from", "to"].some((key) => rows[i][key]?.trim()),
  );
}

function minuteOf(at: Date | null): string {
  return at?.toISOString().slice(0, 16) ?? "";
}
