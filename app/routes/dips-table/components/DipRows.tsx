import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { Sort } from "~/components/ui/sort";
import { type Column, Table } from "~/components/ui/Table";
import { Tag, VerdictTag } from "~/components/ui/Tag";
import { formatDbLimits, formatFrequency } from "~/measurement/units";
import { qText, SwrCell, WidthCell } from "~/routes/sweeps/components/DipsTable";
import type { ListedDip } from "~/services/dips-table/table.server";

export interface DipRowsProps {
  /** The project's address. */
  base: string;
  rows: ListedDip[];
  order: Sort;
  /** Whether the antenna has design bands: else none can be missed. */
  designed: boolean;
}

/** The rows come in order; the heads of the columns lead to other orders. */
export function DipRows({ base, rows, order, designed }: DipRowsProps) {
  return (
    <Table
      caption="Dips of this project"
      columns={columnsFor(base, designed)}
      rows={rows}
      rowKey={(row) => row.publicId}
      sort={order}
    />
  );
}

/** The database has put the rows in order: the same value for all leaves them so. */
const ordered = () => 0;

function columnsFor(base: string, designed: boolean): Column<ListedDip>[] {
  return [
    {
      key: "frequency",
      label: "Frequency",
      sortBy: ordered,
      cell: ({ publicId, numbers }) => (
        <Link to={`${base}/dips/${publicId}`} className="number font-semibold whitespace-nowrap">
          {formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz)}
        </Link>
      ),
      under: {
        key: "band",
        label: "Band",
        cell: (row) => <BandCell {...row.band} designed={designed} />,
      },
    },
    {
      key: "sweep",
      label: "Sweep",
      sortBy: ordered,
      cell: (row) => (
        <Link to={`${base}/sweeps/${row.sweepPublicId}?dip=${row.publicId}`}>{row.sweepTitle}</Link>
      ),
      under: { key: "taken", label: "Taken", sortBy: ordered, cell: (row) => <Taken {...row} /> },
    },
    {
      key: "swr",
      label: "Lowest SWR",
      numeric: true,
      sortBy: ordered,
      cell: ({ numbers }) => <SwrCell dip={numbers} />,
      under: {
        key: "return-loss",
        label: "Return loss",
        sortBy: ordered,
        cell: ({ numbers }) =>
          numbers.edge
            ? ""
            : formatDbLimits(numbers.returnLossDb, numbers.returnLossLowDb, numbers.returnLossHighDb),
      },
    },
    {
      key: "width",
      label: "Bandwidth",
      numeric: true,
      sortBy: ordered,
      cell: ({ numbers }) => <WidthCell dip={numbers} />,
      under: {
        key: "q",
        label: "Q",
        cell: ({ numbers }) => (numbers.edge ? "" : `Q\u2009${qText(numbers)}`),
      },
    },
    {
      key: "verdict",
      label: "Verdict",
      sortBy: ordered,
      cell: ({ verdict }) => <VerdictTag verdict={verdict} />,
      under: { key: "words", label: "in words", cell: ({ verdictText }) => verdictText },
    },
    {
      key: "trail",
      label: "Trail",
      cell: (row) => <TrailCell base={base} row={row} />,
      under: { key: "notes", label: "Notes", cell: ({ noteCount }) => noteWords(noteCount) },
    },
  ];
}

function Taken({ takenAt, createdAt }: Pick<ListedDip, "takenAt" | "createdAt">) {
  if (takenAt) return <DateTime at={takenAt} dateOnly />;
  return (
    <>
      not said; came in <DateTime at={createdAt} dateOnly />
    </>
  );
}

function TrailCell({ base, row }: { base: string; row: ListedDip }) {
  if (!row.trailPublicId) return <span className="soft">none</span>;
  return (
    <Link
      to={`${base}/trails/${row.trailPublicId}`}
      className={row.trailName ? undefined : "number whitespace-nowrap"}
    >
      {row.trailName || trailWords(row.trailHz)}
    </Link>
  );
}

function noteWords(count: number): string {
  if (count === 0) return "no notes";
  return count === 1 ? "1 note" : `${count} notes`;
}

/** A trail without a name goes by its newest dip's frequency, roughly. */
function trailWords(hz: number | null): string {
  return formatFrequency(hz === null ? null : Number(hz.toPrecision(4)));
}

function BandCell({ name, design, designed }: ListedDip["band"] & { designed: boolean }) {
  if (name === null) return <Tag tone="clay">outside every band</Tag>;
  return (
    <span className="inline-flex flex-wrap items-baseline gap-2">
      {name}
      {designed && !design && <Tag tone="clay">not designed for</Tag>}
    </span>
  );
}
