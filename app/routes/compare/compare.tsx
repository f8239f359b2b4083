import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { EmptyState } from "~/components/ui/EmptyState";
import type { Route } from "./+types/compare";
import { loadComparePage } from "./compare-page.server";
import { BandsBySide } from "./components/BandsBySide";
import { ChosenSweeps } from "./components/ChosenSweeps";
import { Curves } from "./components/Curves";
import { DipsBySide } from "./components/DipsBySide";
import { NotShown } from "./components/NotShown";
import { Picker } from "./components/Picker";

export const meta: Route.MetaFunction = () => [{ title: "Sweeps compared · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  return loadComparePage(access, new URL(args.request.url).searchParams);
}

export default function ComparePage({ loaderData }: Route.ComponentProps) {
  const { project, sweeps, shown, view } = loaderData;
  const base = `/projects/${project.publicId}`;
  return (
    <article className="grid gap-8">
      <div className="grid gap-2">
        <Breadcrumbs items={[{ label: "Sweeps", to: `${base}/sweeps` }]} />
        <h2 className="sweep-title">Sweeps compared</h2>
        <NotShown data={loaderData} />
      </div>
      {sweeps.length === 0 && (
        <EmptyState drawing="sweeps" title="Choose the sweeps to lay over one another">
          Two or more of this project, or of any project that you may read. The address keeps the choice.
        </EmptyState>
      )}
      {sweeps.length > 0 && <ChosenSweeps data={loaderData} />}
      <Picker data={loaderData} key={view.sweeps.join()} />
      {shown && <Curves data={loaderData} shown={shown} />}
      {shown && <DipsBySide data={loaderData} shown={shown} />}
      {shown && <BandsBySide data={loaderData} shown={shown} />}
    </article>
  );
}
