import { Form, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Profile } from "~/charts/Profile";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { InputField, SelectField } from "~/components/ui/Field";
import { parseSort } from "~/components/ui/sort";
import { type Column, Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";
import { formatFrequency } from "~/measurement/units";
import { listSweeps, type SweepSummary } from "~/services/sweep-summaries.server";
import type { Route } from "./+types/list";
import { kindOf } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "Sweeps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may } = await requireProject(args, "project.read");
  const search = new URL(args.request.url).searchParams;
  const words = (search.get("q") ?? "").trim().toLowerCase();
  const only = ONLY.find((value) => value === search.get("only")) ?? "all";
  const page = await listSweeps(project.id, { cursor: search.get("cursor") ?? undefined });
  const rows = page.rows.filter((row) => matches(row, words, only));
  return {
    project: { publicId: project.publicId },
    mayAdd: may("sweep.add"),
    rows,
    filtered: rows.length < page.rows.length,
    nextCursor: page.nextCursor,
    words,
    only,
    sort: parseSort(search.get("sort"), SORTABLE, { key: "taken", direction: "descending" }),
  };
}

export default function Sweeps({ loaderData }: Route.ComponentProps) {
  const { project, rows, mayAdd, filtered, nextCursor, sort, words, only } = loaderData;
  const base = `/projects/${project.publicId}/sweeps`;
  if (rows.length === 0 && !filtered && words === "" && only === "all") {
    return (
      <EmptyState
        drawing="sweeps"
        title="No sweeps yet"
        action={mayAdd && <LinkButton to={`${base}/new`}>Add the first sweep</LinkButton>}
      />
    );
  }
  return (
    <section className="grid gap-5" aria-labelledby="sweeps">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <h2 id="sweeps" className="sweep-title">
          Sweeps
        </h2>
        <div className="flex flex-wrap items-center gap-3">
          <Link to={`/projects/${project.publicId}/dips`}>All dips as a table</Link>
          {mayAdd && (
            <>
              <LinkButton to={`${base}/batch`} variant="quiet">
                A folder or a ZIP
              </LinkButton>
              <LinkButton to={`${base}/new`} icon="add">
                Add sweeps
              </LinkButton>
            </>
          )}
        </div>
      </div>
      <Form className="flex flex-wrap items-end gap-3" role="search" aria-label="Sweeps of this project">
        <InputField label="Title or file name" name="q" type="search" defaultValue={words} />
        <SelectField
          label="Show"
          name="only"
          defaultValue={only}
          options={[
            { value: "all", label: "All sweeps" },
            { value: "open", label: "With unsettled dips" },
            { value: "unread", label: "Still to be read" },
          ]}
        />
        <button type="submit" className="button button-quiet">
          Filter
        </button>
      </Form>
      {rows.length === 0 ? (
        <p className="soft">No sweep matches. Change the words or show all sweeps.</p>
      ) : (
        <Form action={`/projects/${project.publicId}/compare`} className="grid gap-3">
          <Table
            caption="Sweeps of this project"
            columns={columnsFor(base)}
            rows={rows}
            rowKey={(row) => row.publicId}
            sort={sort}
          />
          <div className="no-print">
            <Button variant="quiet">Compare the ticked sweeps</Button>
          </div>
        </Form>
      )}
      {nextCursor && (
        <p>
          <Link to={`?cursor=${encodeURIComponent(nextCursor)}`}>Older sweeps</Link>
        </p>
      )}
    </section>
  );
}

function columnsFor(base: string): Column<SweepSummary>[] {
  return [
    {
      key: "title",
      label: "Sweep",
      sortBy: (row) => row.title.toLowerCase(),
      cell: (row) => (
        <span className="sweep-tick">
          <input
            type="checkbox"
            name="sweep"
            value={row.publicId}
            disabled={row.unread}
            aria-label={`Compare ${row.title}`}
          />
          <span className="grid gap-0.5">
            <Link
              to={row.unread ? `${base}/${row.publicId}/reading` : `${base}/${row.publicId}`}
              className="font-semibold"
            >
              {row.title}
            </Link>
            <span className="text-tiny soft break-all">{row.fileName}</span>
          </span>
        </span>
      ),
    },
    {
      key: "profile",
      label: "Profile",
      cell: (row) =>
        row.profile ? (
          <Profile {...row.profile} widthPx={180} heightPx={44} />
        ) : (
          <Tag tone="clay">to be read</Tag>
        ),
    },
    {
      key: "taken",
      label: "Taken",
      sortBy: (row) => (row.takenAt ?? row.createdAt).getTime(),
      cell: (row) =>
        row.takenAt ? (
          <DateTime at={row.takenAt} dateOnly />
        ) : (
          <span className="soft">
            not said; came in <DateTime at={row.createdAt} dateOnly />
          </span>
        ),
    },
    {
      key: "span",
      label: "Span",
      numeric: true,
      sortBy: (row) => row.startHz,
      cell: (row) =>
        row.startHz === null || row.stopHz === null ? "unknown" : spanWords(row.startHz, row.stopHz),
    },
    {
      key: "points",
      label: "Points",
      numeric: true,
      sortBy: (row) => row.pointCount,
      cell: (row) => row.pointCount?.toLocaleString("en") ?? "unknown",
    },
    {
      key: "dips",
      label: "Dips",
      numeric: true,
      sortBy: (row) => (row.unread ? null : row.dips.length),
      cell: (row) => (
        <>
          {row.unread ? "unknown" : row.dips.length}
          {row.openDips > 0 && <span className="block text-clay"> ({unsettled(row)})</span>}
        </>
      ),
    },
    {
      key: "notes",
      label: "Notes",
      numeric: true,
      sortBy: (row) => row.noteCount,
      cell: (row) => row.noteCount,
    },
    { key: "kind", label: "From", sortBy: (row) => kindOf(row.format), cell: (row) => kindOf(row.format) },
  ];
}

/** A unit that both ends share is said once: `1–80 MHz`. */
function spanWords(startHz: number, stopHz: number): string {
  const [from, to] = [startHz, stopHz].map((hz) => formatFrequency(hz, null));
  const [value, unit] = from.split(THIN_SPACE);
  return to.endsWith(`${THIN_SPACE}${unit}`) ? `${value}–${to}` : `${from} – ${to}`;
}

function unsettled({ dips, openDips }: SweepSummary): string {
  return openDips === dips.length ? "unsettled" : `${openDips} unsettled`;
}

function matches(row: SweepSummary, words: string, only: (typeof ONLY)[number]): boolean {
  if (only === "open" && row.openDips === 0) return false;
  if (only === "unread" && !row.unread) return false;
  return words === "" || `${row.title} ${row.fileName}`.toLowerCase().includes(words);
}

const THIN_SPACE = "\u2009";
const ONLY = ["all", "open", "unread"] as const;
const SORTABLE = ["title", "taken", "span", "points", "dips", "notes", "kind"];
