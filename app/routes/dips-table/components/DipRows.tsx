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
      numeric: true,
      sortBy: ordered,
      cell: ({ publicId, numbers }) => (
        <Link to={`${base}/dips/${publicId}`}>
          {formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz)}
        </Link>
      ),
    },
    {
      key: "sweep",
      label: "Sweep",
      sortBy: ordered,
      cell: (row) => (
        <Link
          to={`${base}/sweeps/${row.sweepPublicId}?dip=${row.publicId}`}
          className="inline-block sm:min-w-[12rem]"
        >
          {row.sweepTitle}
        </Link>
      ),
    },
    {
      key: "taken",
      label: "Taken",
      sortBy: ordered,
      cell: (row) =>
        row.takenAt ? (
          <span className="whitespace-nowrap">
            <DateTime at={row.takenAt} dateOnly />
          </span>
        ) : (
          <span className="soft">
            not said; came in <DateTime at={row.createdAt} dateOnly />
          </span>
        ),
    },
    { key: "band", label: "Band", cell: (row) => <BandCell {...row.band} designed={designed} /> },
    {
      key: "swr",
      label: "Lowest SWR",
      numeric: true,
      sortBy: ordered,
      cell: ({ numbers }) => <SwrCell dip={numbers} />,
    },
    {
      key: "return-loss",
      label: "Return loss",
      numeric: true,
      sortBy: ordered,
      cell: ({ numbers }) =>
        numbers.edge
          ? ""
          : formatDbLimits(numbers.returnLossDb, numbers.returnLossLowDb, numbers.returnLossHighDb),
    },
    {
      key: "width",
      label: "Bandwidth",
      numeric: true,
      sortBy: ordered,
      cell: ({ numbers }) => <WidthCell dip={numbers} />,
    },
    { key: "q", label: "Q", numeric: true, sortBy: ordered, cell: ({ numbers }) => qText(numbers) },
    {
      key: "verdict",
      label: "Verdict",
      sortBy: ordered,
      cell: ({ verdict, verdictText }) => (
        <span className="inline-flex flex-wrap items-baseline gap-2">
          <VerdictTag verdict={verdict} />
          {verdictText && <span className="text-small sm:min-w-[9rem]">{verdictText}</span>}
        </span>
      ),
    },
    {
      key: "trail",
      label: "Trail",
      cell: (row) =>
        row.trailPublicId ? (
          <Link
            to={`${base}/trails/${row.trailPublicId}`}
            className={row.trailName ? undefined : "font-mono whitespace-nowrap"}
          >
            {row.trailName || trailWords(row.trailHz)}
          </Link>
        ) : (
          <span className="soft">none</span>
        ),
    },
    { key: "notes", label: "Notes", numeric: true, cell: (row) => row.noteCount },
  ];
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
