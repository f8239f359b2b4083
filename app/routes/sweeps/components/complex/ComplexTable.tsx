import { type Column, Table } from "~/components/ui/Table";
import { formatDegrees, formatImpedance } from "~/measurement/complex/format";
import { gammaToSwr } from "~/measurement/reflection";
import { formatFrequency, formatSwr } from "~/measurement/units";

interface ComplexTableProps {
  frequencyHz: ArrayLike<number>;
  resistanceOhm: ArrayLike<number>;
  reactanceOhm: ArrayLike<number>;
  phaseDeg: ArrayLike<number>;
  re: ArrayLike<number>;
  im: ArrayLike<number>;
}

/** The charts' numbers, one key away, thinned to what can be read. */
export function ComplexTable(props: ComplexTableProps) {
  const count = props.frequencyHz.length;
  const every = Math.ceil(count / MOST_ROWS);
  const rows = Array.from({ length: Math.ceil(count / every) }, (_, k) => k * every);
  return (
    <details>
      <summary>
        The charts as a table
        {every > 1 && <span className="soft"> (every {ordinal(every)} drawn point)</span>}
      </summary>
      <div className="mt-3">
        <Table
          caption="Impedance over frequency"
          columns={columnsFor(props)}
          rows={rows}
          rowKey={(i) => String(i)}
        />
        <p className="soft text-small mt-2">All points are in the Touchstone and CSV downloads.</p>
      </div>
    </details>
  );
}

function columnsFor({
  frequencyHz,
  resistanceOhm,
  reactanceOhm,
  phaseDeg,
  re,
  im,
}: ComplexTableProps): Column<number>[] {
  return [
    { key: "frequency", label: "Frequency", numeric: true, cell: (i) => formatFrequency(frequencyHz[i]) },
    {
      key: "impedance",
      label: "R + jX",
      numeric: true,
      cell: (i) => formatImpedance({ re: resistanceOhm[i], im: reactanceOhm[i] }),
    },
    { key: "swr", label: "SWR", numeric: true, cell: (i) => formatSwr(gammaToSwr(Math.hypot(re[i], im[i]))) },
    { key: "phase", label: "Angle of Γ", numeric: true, cell: (i) => formatDegrees(phaseDeg[i]) },
  ];
}

function ordinal(n: number): string {
  const ending = n % 100 >= 11 && n % 100 <= 13 ? "th" : (["th", "st", "nd", "rd"][n % 10] ?? "th");
  return `${n}${ending}`;
}

const MOST_ROWS = 100;
