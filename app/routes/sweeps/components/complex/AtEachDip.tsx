import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { formatImpedance, formatOhm } from "~/measurement/complex/format";
import { formatFrequency } from "~/measurement/units";
import type { ComplexData } from "../../complex-page.server";

type Row = ComplexData["dips"][number];

/** What phase adds to each dip. */
export function AtEachDip({ data }: { data: ComplexData }) {
  if (data.dips.length === 0) return <p className="soft">There is no dip in this stretch.</p>;
  return (
    <div className="grid gap-2">
      <h3 id="at-each-dip">At each dip</h3>
      <Table
        caption="Impedance at each dip"
        columns={columnsFor(data.referenceOhm)}
        rows={data.dips}
        rowKey={(row) => String(row.frequencyHz)}
      />
      {data.dips.some(({ side }) => side?.benchUnknown) && (
        <p className="soft max-w-[72ch] text-small">
          The bench's directivity is not known, so the side is told by the noise alone: a bridge of 30 dB can
          turn it where the SWR is under 1.07.
        </p>
      )}
      {data.dips.some(({ slope }) => slope && uneven(slope)) && (
        <p className="soft max-w-[72ch] text-small">
          Q by slope is unknown where the slope of R and X changes within the dip: two resonances or a line
          make it.
        </p>
      )}
      {data.moreDips > 0 && <p className="soft">{data.moreDips} more dips; zoom in to see theirs.</p>}
    </div>
  );
}

function columnsFor(referenceOhm: number): Column<Row>[] {
  return [
    { key: "dip", label: "Dip", numeric: true, cell: ({ frequencyHz }) => formatFrequency(frequencyHz) },
    {
      key: "impedance",
      label: "Impedance there",
      numeric: true,
      cell: ({ side }) =>
        side ? formatImpedance({ re: side.resistanceOhm, im: side.reactanceOhm }) : "unknown: a gap",
    },
    { key: "side", label: `Side of ${referenceOhm} Ω`, cell: (row) => <SideCell row={row} /> },
    { key: "q", label: "Q by slope", numeric: true, cell: (row) => <SlopeCell row={row} /> },
    { key: "zero", label: "Nearest resonance (X = 0)", numeric: true, cell: (row) => <ZeroCell row={row} /> },
  ];
}

function SideCell({ row: { side } }: { row: Row }) {
  if (!side) return <span className="soft">unknown</span>;
  if (side.side) return side.side;
  return (
    <span className="soft">
      too near to tell: Γ is known to ±{side.limitGamma.toPrecision(1)}
      {side.benchUnknown && " by noise alone"}
    </span>
  );
}

function SlopeCell({ row: { slope, edge } }: { row: Row }) {
  if (!slope || edge) return <span className="soft">unknown</span>;
  if (uneven(slope)) return <span className="soft">unknown</span>;
  const decimals = slope.q >= 100 || slope.halfWidth >= 0.5 ? 0 : slope.halfWidth >= 0.05 ? 1 : 2;
  const half = slope.halfWidth.toFixed(decimals);
  return (
    <>
      {slope.q.toFixed(decimals)}
      {Number(half) > 0 && <span className="soft"> ± {half}</span>}
    </>
  );
}

/** The interval holds half and half again: no digit of it would mean anything. */
function uneven({ q, halfWidth }: NonNullable<Row["slope"]>): boolean {
  return halfWidth > q / 2;
}

function ZeroCell({ row: { zero } }: { row: Row }) {
  if (!zero) return <span className="soft">none in the sweep</span>;
  return (
    <>
      {formatFrequency(zero.frequencyHz, zero.frequencyHalfHz)}{" "}
      <span className="soft">
        {zero.kind}, R {formatOhm(zero.resistanceOhm)}
      </span>
    </>
  );
}

/** Where the section's numbers are explained. */
export function MethodLink({ id, children }: { id: string; children: string }) {
  return <Link to={`/methods#${id}`}>{children}</Link>;
}
