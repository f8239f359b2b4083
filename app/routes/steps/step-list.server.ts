import type { ProjectAccess } from "~/auth/require.server";
import * as steps from "~/db/steps.server";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { stepsBetween, sweepsAround } from "~/services/step-sweeps";
import { quantityText } from "~/services/step-words";

/** The steps of a project: those that are planned, and those that were done with the newest first. */
export async function loadStepList({ project, person, may }: ProjectAccess) {
  const [listed, sweeps] = await Promise.all([
    steps.findAllByProject(project.id),
    steps.findSweepsInOrder(project.id),
  ]);
  const unit = lengthUnitOf(person);
  const all = listed.map(({ step }) => step);
  const shown = listed.map(({ step, by }) => {
    const around = sweepsAround(step, sweeps);
    return {
      publicId: step.publicId,
      title: step.title,
      state: step.state,
      at: step.at,
      by,
      quantities: step.quantities.map((quantity) => quantityText(quantity, unit)),
      before: around.before && { publicId: around.before.publicId, title: around.before.title },
      after: around.after && { publicId: around.after.publicId, title: around.after.title },
      sharedWith: stepsBetween(step, all, sweeps).map(({ publicId, title }) => ({ publicId, title })),
    };
  });
  return {
    projectId: project.publicId,
    mayEdit: may("step.edit"),
    planned: shown.filter(({ state }) => state === "planned"),
    done: shown.filter(({ state }) => state === "done").reverse(),
  };
}
export type ListedStepData = Awaited<ReturnType<typeof loadStepList>>["done"][number];
