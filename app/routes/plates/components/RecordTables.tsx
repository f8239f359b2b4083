import { Fragment } from "react";
import { Table } from "~/components/ui/Table";
import type { PlateRecord } from "~/services/plates/record";
import { shownTable } from "../shown-table";

/** The plate's numbers with their limits. */
export function RecordTables({ tables }: { tables: PlateRecord["tables"] }) {
  if (tables.length === 0) return <p className="soft">No dip lies in the figure, so there are no numbers.</p>;
  return (
    <div className="grid gap-6">
      {tables.map(shownTable).map(({ title, columns, rows }) => (
        <Table<{ cells: Record<string, string>; key: string }>
          key={title}
          caption={title}
          showCaption
          rows={rows.map((cells, i) => ({ cells, key: String(i) }))}
          rowKey={({ key }) => key}
          columns={columns.map(({ key, label, numeric }) => ({
            key,
            label,
            numeric,
            cell: ({ cells }) => (numeric ? <Figures text={cells[key]} /> : cells[key]),
          }))}
        />
      ))}
    </div>
  );
}

/** A line ends between a number and its limits or between words, never within a number. */
function Figures({ text }: { text: string }) {
  const parts = text.split(" ");
  return parts.map((part, i) => (
    <Fragment key={part}>
      {i > 0 && " "}
      <span className="whitespace-nowrap">{part}</span>
    </Fragment>
  ));
}
