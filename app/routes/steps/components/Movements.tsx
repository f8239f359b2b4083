import type { ReactNode } from "react";
import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { movementWords } from "../movement-words";
import type { StepPageData } from "../step-page.server";

type Row = StepPageData["effect"]["movements"][number];

/** Each dip before and after, and whether it moved by more than its limits. */
export function Movements({ data }: { data: StepPageData }) {
  const { before, after, movements } = data.effect;
  if (!before || !after) return null;
  return (
    <section aria-labelledby="movements" className="grid gap-3">
      <h3 id="movements">How far each dip moved</h3>
      {movements.length === 0 ? (
        <p className="soft">Neither sweep has a dip.</p>
      ) : (
        <>
          <Table
            caption="Movements of the dips"
            rows={movements}
            rowKey={(row) => `${row.before?.publicId} ${row.after?.publicId}`}
            columns={columnsFor(data)}
          />
          <p className="text-small soft max-w-[72ch]">
            ± is the 95 % interval of the movement, from both dips' own. What moves by less than that may not
            have moved at all.
          </p>
        </>
      )}
    </section>
  );
}

function columnsFor({ project, log }: StepPageData): Column<Row>[] {
  const base = `/projects/${project.publicId}`;
  const dip = (one: Row["before"]): ReactNode =>
    one ? (
      <Link to={`${base}/dips/${one.publicId}`}>
        {one.edge ? "at its end" : formatFrequency(one.frequencyHz, one.frequencyUncertaintyHz)}
      </Link>
    ) : (
      <span className="soft">none</span>
    );
  const swr = (one: Row["before"]) =>
    one
      ? formatSwr(
          one.minimumSwr,
          one.minimumSwrLow ?? one.minimumSwrNoiseLow,
          one.minimumSwrHigh ?? one.minimumSwrNoiseHigh,
        )
      : "";
  return [
    { key: "before", label: "Before", numeric: true, cell: (row) => dip(row.before) },
    { key: "after", label: "After", numeric: true, cell: (row) => dip(row.after) },
    {
      key: "movement",
      label: "Movement",
      cell: (row) => <span className={toneOf(row.kind)}>{movementWords(row)}</span>,
    },
    { key: "swr-before", label: "SWR before", numeric: true, cell: (row) => swr(row.before) },
    { key: "swr-after", label: "SWR after", numeric: true, cell: (row) => swr(row.after) },
    {
      key: "look",
      label: "Look",
      cell: (row) => (
        <Link to={`?axis=${log ? "log" : "linear"}&${stretchAround(row)}#effect`} className="no-print">
          closer<span className="sr-only"> at {movementWords(row)}</span>
        </Link>
      ),
    },
  ];
}

function toneOf(kind: Row["kind"]): string {
  if (kind === "moved") return "font-semibold";
  return kind === "appeared" || kind === "vanished" ? "text-clay" : "soft";
}

/** The stretch in which both dips lie, with as much again on either side. */
function stretchAround({ before, after }: Row): string {
  const hz = [before, after].flatMap((dip) => (dip ? [dip.frequencyHz] : []));
  const [low, high] = [Math.min(...hz), Math.max(...hz)];
  const room = Math.max(high - low, high * ROOM);
  const mhz = (value: number) => String(Number((Math.max(0, value) / 1e6).toPrecision(6)));
  return `from=${mhz(low - room)}&to=${mhz(high + room)}`;
}

/** As a part of the frequency: three times a usual 2:1 width (common practice, no source). */
const ROOM = 0.06;
