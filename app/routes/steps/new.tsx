import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as people from "~/db/people.server";
import { NO_ANTENNA } from "~/measurement/antenna";
import { AntennaCautions } from "~/routes/antenna/components/AntennaCautions";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { antennaAt } from "~/services/antennas.server";
import type { Route } from "./+types/new";
import { StepForm } from "./components/StepForm";
import { keepStep } from "./keep-step.server";
import { type StepTexts, targetOptions } from "./step-form";

export const meta: Route.MetaFunction = () => [{ title: "New step · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person } = await requireProject(args, "step.edit");
  const [then, dismissed] = await Promise.all([
    antennaAt(project.id, new Date()),
    person ? people.findDismissals(person.id) : [],
  ]);
  const unit = lengthUnitOf(person);
  const asked = new URL(args.request.url).searchParams;
  const planned = asked.get("state") === "planned";
  const [target, to] = ["target", "to"].map((name) => asked.get(name)?.slice(0, 40) ?? "");
  const texts: StepTexts = {
    title: asked.get("title")?.slice(0, 160) ?? "",
    body: asked.get("body")?.slice(0, 2000) ?? "",
    state: planned ? "planned" : "done",
    at: planned ? "" : new Date().toISOString().slice(0, 16),
    quantities: target && to ? [{ target, to }] : [],
  };
  return {
    projectId: project.publicId,
    texts,
    was: "",
    targets: targetOptions(then.kind === "described" ? then.version.content : NO_ANTENNA, unit),
    described: then.kind === "described",
    dismissed,
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "step.edit");
  return keepStep(access, await args.request.formData(), null);
}

export default function NewStep({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <article className="grid gap-6 max-w-[56rem]">
      <header className="grid gap-2">
        <Breadcrumbs items={[{ label: "Steps", to: `/projects/${loaderData.projectId}/steps` }]} />
        <h2 className="sweep-title">New step</h2>
        <p className="soft max-w-[72ch]">
          One change between two sweeps, with what was measured. One at a time: then its effect can be told.
        </p>
      </header>
      <AntennaCautions dismissed={loaderData.dismissed} />
      <StepForm data={loaderData} answer={actionData ?? null} submit="Keep the step" />
    </article>
  );
}
