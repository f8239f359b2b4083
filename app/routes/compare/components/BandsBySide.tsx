import { type Column, Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";
import { BandFiguresCell } from "~/routes/sweeps/components/bands/BandFiguresCell";
import { bandEdges } from "~/routes/sweeps/components/bands/band-words";
import { NationalLimits } from "~/routes/sweeps/components/bands/NationalLimits";
import type { ComparePageData, ShownComparison } from "../compare-page.server";

type Row = ShownComparison["bands"][number];

/** A row a band, a column a sweep: what each makes of it. */
export function BandsBySide({ data, shown }: { data: ComparePageData; shown: ShownComparison }) {
  const { bands, limit, region } = shown;
  return (
    <section aria-labelledby="bands" className="compare-tables grid gap-3 min-w-0">
      <h3 id="bands">Bands side by side</h3>
      {bands.length === 0 ? (
        <p className="soft">None of the sweeps touches a band.</p>
      ) : (
        <Table
          caption="What each sweep shows of the bands"
          rows={bands}
          rowKey={({ name, lowHz, design }) => `${name} ${lowHz} ${design}`}
          columns={columnsFor(data)}
        />
      )}
      <NationalLimits region={region} limit={limit} />
    </section>
  );
}

function columnsFor({ sweeps }: ComparePageData): Column<Row>[] {
  return [
    {
      key: "band",
      label: "Band",
      cell: (band) => (
        <span className="grid gap-0.5">
          <span className="font-semibold">
            {band.name} {band.design && <Tag tone="fen">design</Tag>}
          </span>
          <span className="text-tiny soft">
            {bandEdges(band)}, limit {band.limitSwr}:1
          </span>
        </span>
      ),
    },
    ...sweeps.map(
      ({ letter, title, publicId }, i): Column<Row> => ({
        key: publicId,
        label: `${letter} ${title.length > LONG ? `${title.slice(0, LONG - 1)}…` : title}`,
        cell: ({ figures }) => <BandFiguresCell figures={figures[i]} />,
      }),
    ),
  ];
}

const LONG = 28;
