import { requireProject } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { EmptyState } from "~/components/ui/EmptyState";
import type { Route } from "./+types/list";
import { StepItem } from "./components/StepItem";
import { loadStepList } from "./step-list.server";

export const meta: Route.MetaFunction = () => [{ title: "Steps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  return loadStepList(await requireProject(args, "project.read"));
}

export default function Steps({ loaderData }: Route.ComponentProps) {
  const { projectId, mayEdit, planned, done } = loaderData;
  const base = `/projects/${projectId}/steps`;
  const none = planned.length + done.length === 0;
  return (
    <div className="grid gap-8">
      <header className="flex flex-wrap items-center justify-between gap-3">
        <h2 className="sweep-title">Steps</h2>
        {mayEdit && !none && (
          <div className="flex flex-wrap gap-2">
            <LinkButton to={`${base}/new`} icon="add" size="small">
              Write a step down
            </LinkButton>
            <LinkButton to={`${base}/new?state=planned`} size="small" variant="quiet">
              Plan one
            </LinkButton>
          </div>
        )}
      </header>
      {none && (
        <EmptyState
          drawing="steps"
          title="No steps yet"
          action={mayEdit && <LinkButton to={`${base}/new`}>Write the first step down</LinkButton>}
        >
          A step is one change between two sweeps: what was cut, moved or added, measured.
        </EmptyState>
      )}
      {planned.length > 0 && (
        <section aria-labelledby="planned" className="grid gap-3">
          <h3 id="planned">Planned</h3>
          <ul className="grid gap-3">
            {planned.map((step) => (
              <StepItem key={step.publicId} step={step} base={base} />
            ))}
          </ul>
        </section>
      )}
      {done.length > 0 && (
        <section aria-labelledby="done" className="grid gap-3">
          <h3 id="done">Done, newest first</h3>
          <ol className="grid gap-3">
            {done.map((step) => (
              <StepItem key={step.publicId} step={step} base={base} />
            ))}
          </ol>
        </section>
      )}
    </div>
  );
}
