import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { formatFrequency, formatSwr, formatWidth } from "~/measurement/units";
import { compareSearch } from "../compare.schema";
import type { ComparePageData, ShownComparison } from "../compare-page.server";
import type { ShownRow } from "../compare-rows";

type Cell = ShownRow["cells"][number];

/** A row a dip, a column a sweep: where it lies, how deep it is, and whether it moved by more than its limits. */
export function DipsBySide({ data, shown: { rows } }: { data: ComparePageData; shown: ShownComparison }) {
  const edges = data.sweeps.filter(({ edgeDips }) => edgeDips > 0).map(({ letter }) => letter);
  return (
    <section aria-labelledby="dips" className="compare-tables grid gap-3 min-w-0">
      <h3 id="dips">Dips side by side</h3>
      {rows.length === 0 ? (
        <p className="soft">None of the sweeps shows a dip inside its range.</p>
      ) : (
        <Table
          caption="Dips of the sweeps, those that are one in a row"
          rows={rows}
          rowKey={({ id }) => id}
          columns={columnsFor(data)}
        />
      )}
      <p className="text-small soft max-w-[72ch]">
        Dips of one trail share a row; others are paired by nearest frequency. ± is the 95 % interval of the
        movement, from both dips' own: what moves by less may not have moved at all.
        {edges.length > 0 &&
          ` Dips at the end of a sweep (${edges.join(", ")}) are left out: where they lie is not known.`}
      </p>
    </section>
  );
}

function columnsFor({ sweeps, reference, view }: ComparePageData): Column<ShownRow>[] {
  const against = sweeps.find(({ publicId }) => publicId === reference);
  return [
    {
      key: "about",
      label: "Dip",
      cell: (row) => (
        <span className="grid gap-0.5">
          <Link to={compareSearch(view, stretchAround(row))} preventScrollReset className="font-semibold">
            {row.name || `about ${formatFrequency(Number(row.aboutHz.toPrecision(3)))}`}
            <span className="sr-only">, look closer</span>
          </Link>
          {row.name && (
            <span className="text-tiny soft">
              about {formatFrequency(Number(row.aboutHz.toPrecision(3)))}
            </span>
          )}
        </span>
      ),
    },
    ...sweeps.map(
      ({ letter, title, publicId }, i): Column<ShownRow> => ({
        key: publicId,
        label: `${letter} ${title.length > LONG ? `${title.slice(0, LONG - 1)}…` : title}`,
        cell: (row) => (
          <DipCell cell={row.cells[i]} against={sweeps.length > 1 ? (against?.letter ?? "") : ""} />
        ),
      }),
    ),
  ];
}

function DipCell({ cell: { dip, words, larger, isReference }, against }: { cell: Cell; against: string }) {
  if (!dip) return <span className="text-small soft">{words}</span>;
  return (
    <span className="grid gap-0.5">
      <Link to={dip.href} className="number">
        {formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}
      </Link>
      <span className="number text-small">SWR {formatSwr(dip.minimumSwr, dip.low, dip.high)}</span>
      <span className="text-tiny soft">
        {dip.widthHz === null
          ? "wide: not reached"
          : `${dip.open ? "at least " : ""}${formatWidth(dip.widthHz, dip.widthUncertaintyHz)} wide at ${dip.limitSwr}:1`}
      </span>
      {!isReference && words && against && (
        <span className={`text-small ${larger ? "font-semibold" : "soft"}`}>{words}</span>
      )}
    </span>
  );
}

/** The stretch in which the row's dips lie, with room on either side. */
function stretchAround({ cells }: ShownRow) {
  const hz = cells.flatMap(({ dip }) => (dip ? [dip.frequencyHz] : []));
  const [low, high] = [Math.min(...hz), Math.max(...hz)];
  const room = Math.max(high - low, high * ROOM);
  return { fromHz: Math.max(0, low - room), toHz: high + room };
}

/** As a part of the frequency: three times a usual 2:1 width (common practice, no source). */
const ROOM = 0.06;
const LONG = 28;
