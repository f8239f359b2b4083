import { type Column, Table } from "~/components/ui/Table";
import { formatFrequency } from "~/measurement/units";
import { MEASURES } from "../bench-scene";

interface Row {
  frequencyHz: number;
  /** dB, in the order of `MEASURES`; null where it is not known. */
  values: (number | null)[];
}

/** The drawing's numbers at a handful of frequencies. */
export function BenchNumbers({ numbers }: { numbers: Row[] }) {
  const columns: Column<Row>[] = [
    {
      key: "frequency",
      label: "Frequency",
      numeric: true,
      cell: (row) => formatFrequency(Number(row.frequencyHz.toPrecision(4)), null),
    },
    ...MEASURES.map(
      (measure, i): Column<Row> => ({
        key: measure.key,
        label: `${measure.title}, dB`,
        numeric: true,
        cell: ({ values }) => values[i]?.toFixed(1) ?? "unknown",
      }),
    ),
  ];
  return (
    <details>
      <summary className="text-small">As numbers</summary>
      <Table
        caption="The bench at a handful of frequencies"
        columns={columns}
        rows={numbers}
        rowKey={(row) => String(row.frequencyHz)}
      />
    </details>
  );
}
