import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { ThreadSection } from "~/components/notes/ThreadSection";
import { Photographs } from "~/components/photographs/Photographs";
import { Markdown } from "~/components/ui/Markdown";
import { redirectWithMessage } from "~/services/flash.server";
import { changeStep, confirmSweeps, deleteStep, stepWas } from "~/services/steps.server";
import type { Route } from "./+types/step";
import { chosenSweeps } from "./chosen-sweeps.server";
import { Effect } from "./components/Effect";
import { Expectations } from "./components/Expectations";
import { Movements } from "./components/Movements";
import { StepHead } from "./components/StepHead";
import { SweepsForm } from "./components/SweepsForm";
import { requireStep } from "./require-step.server";
import { loadStepPage } from "./step-page.server";
import { doneSchema, sweepsSchema } from "./steps.schema";

export const meta: Route.MetaFunction = ({ data }) => [{ title: `${data?.step.title ?? "Step"} · Swale` }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await requireStep(access, args.params.step);
  return loadStepPage(access, found, new URL(args.request.url).searchParams);
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "step.edit");
  const { step } = await requireStep(access, args.params.step);
  const form = await args.request.formData();
  const actor = { projectId: access.project.id, by: access.person?.id ?? null };
  const list = `/projects/${access.project.publicId}/steps`;
  const here = `${list}/${step.publicId}`;
  const intent = String(form.get("intent"));
  switch (intent) {
    case "done": {
      const parsed = doneSchema.safeParse(Object.fromEntries(form));
      if (!parsed.success) return data({ errors: parsed.error.issues.map(({ message }) => message) }, 400);
      const wanted = { ...step, state: "done" as const, at: parsed.data.at };
      const result = await changeStep(step.id, actor, stepWas(step), wanted);
      if (result.kind === "problem") return data({ errors: [result.problem.message] }, 400);
      if (result.kind === "conflict") return data({ errors: [CHANGED] }, 409);
      return redirectWithMessage(here, "The step is done; what it changes of the antenna was changed.");
    }
    case "sweeps": {
      const parsed = sweepsSchema.safeParse(Object.fromEntries(form));
      const chosen = parsed.success ? await chosenSweeps(access.project.id, parsed.data) : null;
      if (!chosen) return data({ errors: ["These are not sweeps of this project. Nothing was kept."] }, 400);
      if (chosen.problem) return data({ errors: [chosen.problem] }, 400);
      await confirmSweeps(step, actor, chosen);
      return redirectWithMessage(here, "The sweeps beside this step were kept.");
    }
    case "delete":
      await deleteStep(step, actor);
      return redirectWithMessage(list, `“${step.title}” was deleted, and what it changed of the antenna.`);
    default:
      return data(
        { errors: ["The form asked for something this page does not do. Nothing was changed."] },
        400,
      );
  }
}

export default function StepPage({ loaderData, actionData }: Route.ComponentProps) {
  const { step, project, bodyHtml, photographs, mayEdit } = loaderData;
  return (
    <article className="grid gap-8">
      <StepHead data={loaderData} errors={actionData?.errors ?? []} />
      {bodyHtml && <Markdown html={bodyHtml} />}
      <Expectations data={loaderData} />
      <Effect data={loaderData} />
      <Movements data={loaderData} />
      <SweepsForm data={loaderData} />
      <Photographs
        project={project.publicId}
        of={{ step: step.publicId }}
        photographs={photographs}
        mayEdit={mayEdit}
        what="what was changed, with a tape beside it"
      />
      <ThreadSection
        projectId={project.publicId}
        place={{ step: step.publicId }}
        thread={loaderData.thread}
        mayWrite={loaderData.mayWrite}
      />
    </article>
  );
}

const CHANGED = "Somebody else changed this step in the meantime. Nothing was kept: load the page anew.";
