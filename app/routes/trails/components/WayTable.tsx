import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Table } from "~/components/ui/Table";
import type { TrailPageData } from "../trail-page.server";
import { Problems } from "./Problems.tsx";

type Stop = TrailPageData["stops"][number] & { before: string | null };

/** The way in numbers, newest first, as on the map. "(within)": not beyond the limits of the two together. */
export function WayTable({ data, errors }: { data: TrailPageData; errors: string[] }) {
  const { project, stops, may } = data;
  const base = `/projects/${project.publicId}`;
  const rows: Stop[] = stops
    .map((stop, i) => ({ ...stop, before: stops[i - 1]?.publicId ?? null }))
    .reverse();
  return (
    <div className="grid gap-2">
      <Table<Stop>
        caption="The trail's dips, newest first"
        rows={rows}
        rowKey={({ publicId }) => publicId}
        columns={[
          {
            key: "sweep",
            label: "Sweep",
            cell: ({ sweep }) => (
              <>
                <Link to={`${base}/sweeps/${sweep.publicId}`}>{sweep.title}</Link>{" "}
                <span className="soft text-small">
                  {sweep.takenAt ? <DateTime at={sweep.takenAt} dateOnly /> : "date not said"}
                </span>
              </>
            ),
          },
          {
            key: "frequency",
            label: "Frequency",
            numeric: true,
            cell: ({ publicId, frequency, uncertainty }) => (
              <>
                <Link to={`${base}/dips/${publicId}`}>{frequency}</Link>{" "}
                <span className="soft">± {uncertainty}</span>
              </>
            ),
          },
          {
            key: "moved",
            label: "Moved since the last",
            numeric: true,
            cell: ({ moved }) =>
              moved && (
                <span className={moved.beyond ? undefined : "soft"}>
                  {moved.words}
                  {moved.beyond === false && " (within)"}
                </span>
              ),
          },
          { key: "swr", label: "Lowest SWR", numeric: true, cell: ({ swr }) => swr },
          {
            key: "width",
            label: "Width",
            numeric: true,
            cell: ({ width, widthUncertainty }) => (
              <>
                {width} {widthUncertainty && <span className="soft">± {widthUncertainty}</span>}
              </>
            ),
          },
          { key: "notes", label: "Notes", numeric: true, cell: ({ noteCount }) => noteCount },
          ...(may.correct
            ? [
                {
                  key: "part",
                  label: "By hand",
                  cell: ({ publicId, before }: Stop) => <PartForm one={before} other={publicId} />,
                },
              ]
            : []),
        ]}
      />
      <Problems errors={errors} />
    </div>
  );
}

function PartForm({ one, other }: { one: string | null; other: string }) {
  if (one === null) return null;
  return (
    <Form method="post" className="no-print">
      <input type="hidden" name="intent" value="part" />
      <input type="hidden" name="one" value={one} />
      <input type="hidden" name="other" value={other} />
      <Button variant="quiet" size="small" title="This dip is not the same as the one before it">
        Part here
      </Button>
    </Form>
  );
}
