import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { EmptyState } from "~/components/ui/EmptyState";
import { bandChoices } from "~/services/dips-table/bands";
import { dipsPage, PAGE_ROWS } from "~/services/dips-table/table.server";
import type { Route } from "./+types/table";
import { DipRows } from "./components/DipRows";
import { Filters } from "./components/Filters";
import { onPage, parseTable } from "./dips-table.schema";

export const meta: Route.MetaFunction = () => [{ title: "All dips · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may } = await requireProject(args, "project.read");
  const { asked, order, page, typed, errors, filtered } = parseTable(new URL(args.request.url).searchParams);
  const found = await dipsPage(project, asked, order, page);
  const { rows, all, more, sweeps, bands } = found;
  const from = (page - 1) * PAGE_ROWS;
  return {
    project: { publicId: project.publicId },
    mayAdd: may("sweep.add"),
    rows,
    all,
    designed: bands.design.length > 0,
    span: { from: from + 1, to: from + rows.length },
    newer: page > 1 ? onPage(typed, page - 1) : null,
    further: more ? onPage(typed, page + 1) : null,
    order,
    typed,
    errors,
    filtered,
    choices: { bands: bandChoices(bands), sweeps },
  };
}

export default function AllDips({ loaderData }: Route.ComponentProps) {
  const { project, rows, all, typed, errors, filtered, choices, order, designed, mayAdd } = loaderData;
  const base = `/projects/${project.publicId}`;
  if (all === 0 && !filtered) {
    return (
      <EmptyState
        drawing="sweeps"
        title="No dips yet"
        action={mayAdd && <LinkButton to={`${base}/sweeps/new`}>Add a sweep</LinkButton>}
      >
        Every dip of every sweep stands here as a row, once a sweep with one is in.
      </EmptyState>
    );
  }
  const search = new URLSearchParams(typed);
  search.delete("page");
  return (
    <section className="grid gap-5" aria-labelledby="all-dips">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <h2 id="all-dips" className="sweep-title">
          All dips
        </h2>
        <a
          href={`${base}/dips.csv${search.size > 0 ? `?${search}` : ""}`}
          className="button button-quiet no-print"
          download
        >
          CSV of {all === 1 ? "this dip" : `these ${all.toLocaleString("en")} dips`}
        </a>
      </div>
      <Filters typed={typed} errors={errors} choices={choices} filtered={filtered} />
      {rows.length === 0 ? (
        <p className="soft">
          No dip is like that. Widen the range, or <Link to="?">show all of them</Link>.
        </p>
      ) : (
        <DipRows base={base} rows={rows} order={order} designed={designed} />
      )}
      <Pages data={loaderData} />
    </section>
  );
}

function Pages({ data }: { data: Route.ComponentProps["loaderData"] }) {
  const { rows, all, span, newer, further } = data;
  if (!newer && !further) return null;
  return (
    <nav aria-label="Pages of the table" className="flex flex-wrap gap-5 no-print">
      {newer && <Link to={newer}>Page before</Link>}
      {rows.length > 0 && (
        <span className="soft">
          {span.from.toLocaleString("en")}–{span.to.toLocaleString("en")} of {all.toLocaleString("en")}
        </span>
      )}
      {further && <Link to={further}>Next page</Link>}
    </nav>
  );
}
