import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Table } from "~/components/ui/Table";
import type { TrailPageData } from "../trail";
import { Problems } from "./Problems.tsx";

type Stop = TrailPageData["stops"][number] & { before: string | null };

/** The way in numbers, newest first, as on the map. */
export function WayTable({ data, errors }: { data: TrailPageData; errors: string[] }) {
  const { project, stops, may, happened, expected } = data;
  const base = `/projects/${project.publicId}`;
  const rows: Stop[] = stops
    .map((stop, i) => ({ ...stop, before: stops[i - 1]?.publicId ?? null }))
    .reverse();
  return (
    <section aria-labelledby="way" className="grid gap-3">
      <h2 id="way">Along the way</h2>
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
            label: "Moved",
            numeric: true,
            cell: ({ moved }) =>
              moved && (
                <span className={moved.beyond ? undefined : "soft"}>
                  {moved.words}
                  {moved.beyond === false && ", within its limits"}
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
      {happened.length > 0 && (
        <ul className="text-small grid gap-1">
          {happened.map(({ kind, sweepId, sweepTitle, other }) => (
            <li key={`${kind} ${sweepId}`}>
              {SAID[kind]}
              {other && (
                <>
                  {" "}
                  <Link to={`${base}/trails/${other.publicId}`}>{other.label}</Link>
                </>
              )}
              {sweepTitle && ` in “${sweepTitle}”`}
            </li>
          ))}
        </ul>
      )}
      {expected.length > 0 && (
        <>
          <h3>Expected</h3>
          <ul className="text-small grid gap-2">
            {expected.map((place) => (
              <li key={place.step.publicId}>
                After <Link to={`${base}/steps/${place.step.publicId}`}>{place.step.title}</Link>
                {place.step.planned && " (planned)"}: <span className="font-mono">{place.frequency}</span>
                {place.interval && `, between ${place.interval}`}.{" "}
                {place.came && (
                  <strong className="font-semibold">
                    It came out at {place.came.frequency} in “{place.came.sweepTitle}”
                    {place.met === null
                      ? "."
                      : place.met
                        ? ": inside what was expected."
                        : ": outside what was expected."}
                  </strong>
                )}{" "}
                <span className="soft">{place.how}</span>
              </li>
            ))}
          </ul>
        </>
      )}
    </section>
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

const SAID: Record<TrailPageData["happened"][number]["kind"], string> = {
  appears: "Appeared",
  vanishes: "Not seen any more from the sweep after its last one",
  missed: "Not seen in a sweep between that reaches it",
  "not-covered": "A sweep between does not reach it",
  "splits-from": "Split from the trail",
  "merges-into": "Merged into the trail",
};
