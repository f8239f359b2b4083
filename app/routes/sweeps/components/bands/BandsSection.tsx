import { Link } from "react-router";
import { type Column, Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";
import type { SweepBand } from "~/services/bands.server";
import type { BandsData } from "../../bands-page.server";
import { bandEdges, bestWords, shareWords, swrWords } from "./band-words";
import { NationalLimits } from "./NationalLimits";
import { TargetsTable } from "./TargetsTable";

/** What the sweep shows of every band that it touches, and how far its dips lie from the design bands. */
export function BandsSection({ data }: { data: BandsData }) {
  const { bands, region, limit } = data;
  return (
    <>
      <section aria-labelledby="bands" className="bands-table grid gap-3 min-w-0">
        <h2 id="bands">
          Bands{" "}
          <Link to="/methods#bands" className="text-small font-normal font-sans">
            How they are reckoned
          </Link>
        </h2>
        {bands.length === 0 ? (
          <p className="soft">
            The sweep touches no band of our tables, and the project has no design band here.
          </p>
        ) : (
          <Table
            caption="What the sweep shows of each band"
            columns={COLUMNS}
            rows={bands}
            rowKey={({ name, lowHz, design }) => `${name} ${lowHz} ${design}`}
          />
        )}
        <NationalLimits region={region} limit={limit} />
      </section>
      <TargetsTable data={data} />
    </>
  );
}

const COLUMNS: Column<SweepBand>[] = [
  {
    key: "band",
    label: "Band",
    cell: (band) => (
      <span className="inline-flex flex-wrap items-baseline gap-x-2">
        <span className="font-semibold">{band.name}</span>
        {band.design && <Tag tone="fen">design</Tag>}
        <span className="number text-small soft">{bandEdges(band)}</span>
        {band.remark && <span className="text-tiny soft">{band.remark}</span>}
      </span>
    ),
  },
  { key: "low", label: "Lower edge", numeric: true, cell: ({ swrLow }) => swrWords(swrLow) },
  { key: "middle", label: "SWR, middle", numeric: true, cell: ({ swrMiddle }) => swrWords(swrMiddle) },
  { key: "high", label: "Upper edge", numeric: true, cell: ({ swrHigh }) => swrWords(swrHigh) },
  { key: "best", label: "Lowest SWR", numeric: true, cell: bestWords },
  {
    key: "share",
    label: "Share under the limit",
    cell: (band) => <span className={toneOf(band.shareUnder)}>{shareWords(band)}</span>,
  },
];

function toneOf(share: number | null): string {
  if (share === null) return "soft";
  return share === 1 ? "text-moss" : share === 0 ? "text-clay" : "";
}
