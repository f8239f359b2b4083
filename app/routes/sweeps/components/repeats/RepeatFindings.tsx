import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { formatFrequency, formatSwr, formatWidth } from "~/measurement/units";
import { formatDate } from "~/services/dates";
import type { RepeatsData } from "../../repeats-page.server";
import { MeanChart } from "./MeanChart";

type Findings = NonNullable<RepeatsData["findings"]>;
type RepeatedDip = Findings["dips"][number];

interface RepeatFindingsProps {
  findings: Findings;
  group: RepeatsData["group"];
  base: string;
}

/** The mean of the repeats with its spread, dip by dip and point by point. */
export function RepeatFindings({ findings, group, base }: RepeatFindingsProps) {
  const { mean, dips, count, warnings } = findings;
  const differing = dips.filter((dip) => dip.warnings.length > 0);
  return (
    <>
      {differing.length > 0 && (
        <div role="status" className="panel border-l-3 border-l-clay grid gap-1">
          <p className="font-semibold text-clay">{differing[0].warnings[0].message}</p>
          <p className="text-small">
            So at{" "}
            <span className="font-mono">
              {differing.map((dip) => formatFrequency(dip.frequencyHz, dip.frequencySpreadHz)).join(", ")}
            </span>
            : a connector, the weather, or something that moved. Sweep once more before trusting a change of
            this size.
          </p>
        </div>
      )}
      {mean && (
        <figure className="grid gap-2 min-w-0">
          <MeanChart mean={mean} />
          <figcaption className="text-small soft">
            The mean of {count} sweeps; the band is one standard deviation of a single sweep to each side.
          </figcaption>
        </figure>
      )}
      {warnings.map(({ code, message }) => (
        <p key={code} className="text-small soft">
          {message}
        </p>
      ))}
      <section aria-labelledby="repeated-dips" className="grid gap-3">
        <h3 id="repeated-dips">Dips over the repeats</h3>
        {dips.length === 0 ? (
          <p className="soft">The first of these sweeps has no dip to follow.</p>
        ) : (
          <Table
            caption="Dips over the repeats"
            columns={columnsFor(count)}
            rows={dips}
            rowKey={(dip) => String(dip.frequencyHz)}
          />
        )}
      </section>
      <section aria-labelledby="members" className="grid gap-2">
        <h3 id="members">The repeats</h3>
        <ul className="grid gap-1">
          {group.map(({ publicId, title, takenAt }) => (
            <li key={publicId}>
              <Link to={`${base}/${publicId}`}>{title}</Link>{" "}
              <span className="soft text-small">
                {takenAt ? formatDate(new Date(takenAt)) : "date not said"}
              </span>
            </li>
          ))}
        </ul>
      </section>
    </>
  );
}

function columnsFor(count: number): Column<RepeatedDip>[] {
  return [
    {
      key: "frequency",
      label: "Frequency, mean",
      numeric: true,
      cell: (dip) => formatFrequency(dip.frequencyHz, dip.frequencySpreadHz),
    },
    {
      key: "frequency-spread",
      label: "its spread",
      numeric: true,
      cell: (dip) =>
        dip.frequencySpreadHz === null
          ? "unknown"
          : formatWidth(dip.frequencySpreadHz, dip.frequencySpreadHz),
    },
    { key: "swr", label: "Lowest SWR, mean", numeric: true, cell: (dip) => formatSwr(dip.minimumSwr) },
    {
      key: "swr-spread",
      label: "its spread",
      numeric: true,
      cell: (dip) => (dip.minimumSwrSpread === null ? "unknown" : dip.minimumSwrSpread.toPrecision(1)),
    },
    { key: "found", label: "Found in", numeric: true, cell: (dip) => `${dip.found} of ${count}` },
    {
      key: "against",
      label: "Against the limits",
      cell: (dip) =>
        dip.warnings.length > 0 ? (
          <span className="text-clay">larger than they allow</span>
        ) : dip.found < 2 ? (
          <span className="soft">unknown</span>
        ) : (
          "inside"
        ),
    },
  ];
}
