import { Link } from "react-router";
import { parseSort } from "~/components/ui/sort";
import { type Column, Table } from "~/components/ui/Table";
import { VerdictTag } from "~/components/ui/Tag";
import type { Bandwidth, Dip } from "~/measurement/sweep";
import {
  formatDbLimits,
  formatFrequency,
  formatRange,
  formatSwr,
  formatWidth,
  formatWidthLimits,
} from "~/measurement/units";
import type { ShownDip } from "~/services/shown-dips.server";
import { type SweepView, searchWith } from "../sweeps.schema";

/** The dips as numbers, one key away from the chart. */
export function DipsTable({ dips, view, swrLimit }: { dips: ShownDip[]; view: SweepView; swrLimit: number }) {
  const sort = parseSort(view.sort, SORTABLE, { key: "frequency", direction: "ascending" });
  if (dips.length === 0) {
    return (
      <p className="soft">
        No dip has the prominence that the settings ask for. A smaller prominence shows shallower ones.
      </p>
    );
  }
  return (
    <Table
      caption="Dips of this sweep"
      columns={columnsFor(view, swrLimit)}
      rows={dips}
      rowKey={(dip) => dip.publicId ?? String(dip.frequencyHz)}
      sort={sort}
    />
  );
}

function columnsFor(view: SweepView, swrLimit: number): Column<ShownDip>[] {
  return [
    {
      key: "frequency",
      label: "Frequency",
      numeric: true,
      sortBy: (dip) => dip.frequencyHz,
      cell: (dip) => {
        const text = formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz);
        return dip.publicId ? (
          <Link to={searchWith(view, { dip: dip.publicId })} preventScrollReset>
            {text}
          </Link>
        ) : (
          text
        );
      },
    },
    {
      key: "swr",
      label: "Lowest SWR",
      numeric: true,
      sortBy: (dip) => dip.minimumSwr,
      cell: (dip) => <SwrCell dip={dip} />,
    },
    {
      key: "return-loss",
      label: "Return loss",
      numeric: true,
      sortBy: (dip) => dip.returnLossDb,
      cell: (dip) =>
        dip.edge ? "" : formatDbLimits(dip.returnLossDb, dip.returnLossLowDb, dip.returnLossHighDb),
    },
    {
      key: "width",
      label: `${swrLimit}:1 bandwidth`,
      numeric: true,
      sortBy: (dip) => dip.bandwidth?.widthHz ?? null,
      cell: (dip) => <WidthCell dip={dip} />,
    },
    {
      key: "edges",
      label: "From – to",
      numeric: true,
      sortBy: (dip) => dip.bandwidth?.lowHz ?? null,
      cell: (dip) => (dip.bandwidth ? edges(dip.bandwidth) : ""),
    },
    {
      key: "q",
      label: "Q",
      numeric: true,
      sortBy: (dip) => dip.q ?? dip.qLow,
      cell: (dip) => qText(dip),
    },
    {
      key: "method",
      label: "Method",
      sortBy: (dip) => dip.method,
      cell: (dip) => (dip.edge ? "edge" : METHODS[dip.method]),
    },
    {
      key: "verdict",
      label: "Verdict",
      sortBy: (dip) => dip.verdict,
      cell: (dip) => <VerdictTag verdict={dip.verdict} />,
    },
    {
      key: "notes",
      label: "Notes",
      numeric: true,
      sortBy: (dip) => dip.noteCount,
      cell: (dip) => dip.noteCount,
    },
  ];
}

export function SwrCell({ dip }: { dip: Dip }) {
  if (dip.edge) return <span className="soft">the sweep ends here</span>;
  return (
    <>
      {formatSwr(
        dip.minimumSwr,
        dip.minimumSwrLow ?? dip.minimumSwrNoiseLow,
        dip.minimumSwrHigh ?? dip.minimumSwrNoiseHigh,
      )}
    </>
  );
}

export function WidthCell({ dip }: { dip: Dip }) {
  if (dip.edge) return null;
  if (!dip.bandwidth) return <span className="soft">none: not reached</span>;
  const { widthHz, widthUncertaintyHz, widthLowHz, widthHighHz, open, shared } = dip.bandwidth;
  return (
    <>
      {open && "at least "}
      {widthLowHz === null || widthHighHz === null
        ? formatWidth(widthHz, widthUncertaintyHz)
        : formatWidthLimits(widthHz, widthLowHz, widthHighHz)}
      {shared && <span className="soft">, shared</span>}
    </>
  );
}

function edges({ lowHz, highHz, widthUncertaintyHz }: Bandwidth): string {
  const show = (hz: number | null) => (hz === null ? "sweep ends" : formatFrequency(hz, widthUncertaintyHz));
  const [low, high] = [show(lowHz), show(highHz)];
  const unit = high.match(SPACE_AND_UNIT)?.[0];
  // One unit for both, where it is the same.
  return unit && low.endsWith(unit) ? `${low.slice(0, -unit.length)}–${high}` : `${low} – ${high}`;
}

/** With its limits where the bench's errors are known, else its range from what a scalar sweep can't tell. */
export function qText(dip: Pick<Dip, "q" | "qLow" | "qHigh" | "qLimits">): string {
  if (dip.qLimits) return formatRange(dip.qLimits.low, dip.qLimits.high);
  if (dip.q !== null) return dip.q.toPrecision(3);
  if (dip.qLow !== null && dip.qHigh !== null) return formatRange(dip.qLow, dip.qHigh);
  return "unknown";
}

const SPACE_AND_UNIT = /\u2009\S+$/;
const METHODS = { fit: "fit", parabola: "parabola", sample: "lowest sample" } as const;
const SORTABLE = ["frequency", "swr", "return-loss", "width", "edges", "q", "method", "verdict", "notes"];
