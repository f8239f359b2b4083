import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { type Column, Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";
import type { ShownBatch, ShownRow } from "../run-page.server";

/** The rows as they would be taken in, and those that are left out. */
export function RowsTable({ batch, base }: { batch: ShownBatch; base: string }) {
  const rows = batch.rows.filter(({ problems }) => problems.length === 0);
  if (rows.length === 0) return null;
  const here = `${base}/sweeps/batch/${batch.publicId}`;
  return (
    <section aria-labelledby="rows" className="grid grid-cols-1 gap-3">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h3 id="rows">{batch.phase === "checked" ? "Ready" : "What came"}</h3>
        <a href={`${here}/sweeps.csv`} download>
          All rows as a table (CSV), to be filled in
        </a>
      </div>
      <Table
        caption="Rows of the batch"
        columns={columnsFor(batch, here)}
        rows={rows}
        rowKey={({ index }) => String(index)}
      />
    </section>
  );
}

function columnsFor(batch: ShownBatch, here: string): Column<ShownRow>[] {
  const labelOf = (options: ShownBatch["benches"], chosen: string) =>
    options.find(({ value }) => value === chosen)?.label ?? chosen;
  const notSaid = <span className="soft">not said</span>;
  return [
    { key: "file", label: "File", cell: ({ name }) => <span className="break-all">{name}</span> },
    {
      key: "title",
      label: "Title",
      cell: ({ wanted }) => wanted.title || <span className="soft">from its name</span>,
    },
    { key: "taken", label: "Taken at, UTC", cell: ({ wanted }) => wanted.takenAt || notSaid },
    { key: "bench", label: "Bench", cell: ({ chosen }) => labelOf(batch.benches, chosen.bench) || notSaid },
    {
      key: "step",
      label: "After the step",
      cell: ({ chosen }) => labelOf(batch.steps, chosen.step) || notSaid,
    },
    { key: "found", label: "Found", cell: (row) => <Found row={row} /> },
    {
      key: "change",
      label: "",
      cell: (row) => batch.phase === "checked" && <Change row={row} here={here} />,
    },
  ];
}

function Found({ row }: { row: ShownRow }) {
  if (row.leftOut) return <Tag>left out</Tag>;
  if (row.toRead) {
    return (
      <span className="grid gap-1 justify-items-start">
        <Tag tone="clay">to be read</Tag>
        <span className="text-small">{row.found}</span>
      </span>
    );
  }
  return row.found || <span className="soft">not looked at yet</span>;
}

function Change({ row, here }: { row: ShownRow; here: string }) {
  if (!row.leftOut) {
    return (
      <Link to={`${here}?edit=${row.index}`} preventScrollReset={false} aria-label={`Change ${row.name}`}>
        Change
      </Link>
    );
  }
  return (
    <Form method="post">
      <input type="hidden" name={`row-${row.index}-name`} value={row.name} />
      <Button
        name="intent"
        value="mend"
        variant="quiet"
        size="small"
        aria-label={`Take ${row.name} after all`}
      >
        Take after all
      </Button>
    </Form>
  );
}
