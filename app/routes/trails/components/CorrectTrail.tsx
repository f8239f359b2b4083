import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import type { TrailPageData } from "../trail-page.server";
import { Problems } from "./Problems.tsx";

/** Joining by hand, and what was corrected so far, each to be taken back. */
export function CorrectTrail({ data, errors }: { data: TrailPageData; errors: string[] }) {
  const { corrections, may, others, project } = data;
  if (!may.correct && corrections.length === 0) return null;
  return (
    <section aria-labelledby="by-hand" className="grid gap-3">
      <h2 id="by-hand">Corrected by hand</h2>
      <p className="soft text-small max-w-[72ch]">
        A correction is a word on two dips. It outranks the pairing by distance for ever, also when sweeps
        come and go.
      </p>
      {corrections.length === 0 && <p className="soft">Nothing was corrected on this trail.</p>}
      {corrections.length > 0 && (
        <ul className="grid gap-2">
          {corrections.map(({ kind, by, at, one, other, overruled }) => (
            <li
              key={`${one.publicId} ${other.publicId}`}
              className="panel flex flex-wrap items-center gap-x-4 gap-y-1"
            >
              <p className="text-small grow">
                <DipLink project={project.publicId} dip={one} /> and{" "}
                <DipLink project={project.publicId} dip={other} />{" "}
                {kind === "same" ? "are the same dip" : "are not the same dip"}
                <span className="soft">
                  {" · "}
                  {by ?? "former member"}, <DateTime at={at} dateOnly />
                  {overruled && ", outranked by a newer one"}
                </span>
              </p>
              {may.correct && (
                <Form method="post" className="no-print">
                  <input type="hidden" name="intent" value="take-back" />
                  <input type="hidden" name="one" value={one.publicId} />
                  <input type="hidden" name="other" value={other.publicId} />
                  <Button variant="quiet" size="small">
                    Take back
                  </Button>
                </Form>
              )}
            </li>
          ))}
        </ul>
      )}
      {may.correct && others.length > 0 && (
        <Form method="post" className="flex flex-wrap items-end gap-3 no-print">
          <input type="hidden" name="intent" value="join" />
          <label className="grid gap-1">
            <span className="text-small soft">Join it with the trail</span>
            <select name="other" className="control" required>
              {others.map(({ publicId, label, stops }) => (
                <option key={publicId} value={publicId}>
                  {label} ({stops === 1 ? "1 sweep" : `${stops} sweeps`})
                </option>
              ))}
            </select>
          </label>
          <Button variant="quiet">Join</Button>
        </Form>
      )}
      <Problems errors={errors} />
    </section>
  );
}

function DipLink({ project, dip }: { project: string; dip: TrailPageData["corrections"][number]["one"] }) {
  return (
    <>
      <Link to={`/projects/${project}/dips/${dip.publicId}`} className="font-mono">
        {dip.frequency}
      </Link>{" "}
      in “{dip.sweepTitle}”
    </>
  );
}
