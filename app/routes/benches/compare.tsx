import { Form } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { SelectField } from "~/components/ui/Field";
import type { Route } from "./+types/compare";
import { parseWish } from "./benches.schema";
import { loadComparison } from "./compare-page.server";
import { BenchNumbers } from "./components/BenchNumbers";
import { BenchStrips } from "./components/BenchStrips";
import { requireBench } from "./require-bench.server";

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `${data?.bench.name ?? "Bench"} compared · Swale` },
];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await requireBench(access, args.params.bench);
  const search = new URL(args.request.url).searchParams;
  return loadComparison(access, found, parseWish(search), search.get("version"), search.get("with"));
}

export default function CompareBenches({ loaderData }: Route.ComponentProps) {
  const { project, bench, version, choices, other, words, scene, numbers, names } = loaderData;
  const base = `/projects/${project.publicId}/benches`;
  return (
    <article className="grid gap-6">
      <div className="grid gap-2">
        <Breadcrumbs
          items={[
            { label: "Benches", to: base },
            { label: bench.name, to: `${base}/${bench.publicId}` },
          ]}
        />
        <h2>{bench.name} compared</h2>
      </div>
      {choices.length === 0 ? (
        <p className="soft max-w-[60ch]">
          There is nothing to compare it with yet: write a rebuilt bench down, or another bench.
        </p>
      ) : (
        <Form className="flex flex-wrap items-end gap-3 no-print">
          <input type="hidden" name="version" value={version} />
          <SelectField
            label="With"
            name="with"
            defaultValue={other ?? undefined}
            key={other}
            options={choices}
          />
          <Button variant="quiet">Compare</Button>
        </Form>
      )}
      {words.length > 0 && (
        <section aria-labelledby="differences" className="grid gap-2">
          <h3 id="differences">What is different</h3>
          <p className="soft text-small">{names.join(", against ")}</p>
          <ul className="bench-sentences">
            {words.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        </section>
      )}
      {scene && <BenchStrips scene={scene} names={names} label={`${names.join(" and ")} over frequency`} />}
      {numbers.map((rows, i) => (
        <section key={names[i]} className="grid gap-1" aria-label={names[i]}>
          <p className="text-small font-semibold">{names[i]}</p>
          <BenchNumbers numbers={rows} />
        </section>
      ))}
    </article>
  );
}
