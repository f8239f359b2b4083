import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { NO_ANTENNA } from "~/measurement/antenna";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { antennaAt } from "~/services/antennas.server";
import { stepWas } from "~/services/steps.server";
import type { Route } from "./+types/edit";
import { StepForm } from "./components/StepForm";
import { keepStep } from "./keep-step.server";
import { requireStep } from "./require-step.server";
import { targetOptions, textsOf } from "./step-form";

export const meta: Route.MetaFunction = ({ data }) => [{ title: `${data?.texts.title ?? "Step"} · Swale` }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "step.edit");
  const { step } = await requireStep(access, args.params.step);
  const then = await antennaAt(access.project.id, step.at ?? new Date());
  const unit = lengthUnitOf(access.person);
  return {
    projectId: access.project.publicId,
    stepId: step.publicId,
    texts: textsOf(step, unit),
    was: JSON.stringify(stepWas(step)),
    targets: targetOptions(then.kind === "described" ? then.version.content : NO_ANTENNA, unit),
    described: then.kind === "described",
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "step.edit");
  const { step } = await requireStep(access, args.params.step);
  return keepStep(access, await args.request.formData(), step);
}

export default function EditStep({ loaderData, actionData }: Route.ComponentProps) {
  const { projectId, stepId, texts } = loaderData;
  const base = `/projects/${projectId}/steps`;
  return (
    <article className="grid gap-6 max-w-[56rem]">
      <header className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Steps", to: base },
            { label: texts.title, to: `${base}/${stepId}` },
          ]}
        />
        <h2 className="sweep-title">Change the step</h2>
        <p className="soft max-w-[72ch]">
          What it changed of the antenna is changed with it, unless that was changed again since.
        </p>
      </header>
      <StepForm data={loaderData} answer={actionData ?? null} submit="Keep the change" />
    </article>
  );
}
