import { Form, Link, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import type { SweepPageData } from "../../sweep-page.server";
import { searchWith } from "../../sweeps.schema";
import { BenchDialog } from "./BenchDialog";
import { FeedlineDialog } from "./FeedlineDialog";

interface CorrectionBarProps {
  data: SweepPageData;
  /** Of the form that was sent last, by field. */
  errors: Record<string, string[]> | undefined;
}

/** Where the curve is referred to, what was done to bring it there, and what that needs. */
export function CorrectionBar({ data, errors }: CorrectionBarProps) {
  const { correction, view } = data;
  const { plane: shown, storedPlane, planes, choices } = correction;
  const missing = planes.filter((one) => one.missing !== null);
  return (
    <section aria-label="Correction" className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <nav aria-label="Plane" className="choice">
          {planes.map(({ plane, word, missing: lacks }) =>
            lacks === null ? (
              <Link
                key={plane}
                to={searchWith(view, { plane: plane === storedPlane ? null : plane }) || "?"}
                replace
                preventScrollReset
                aria-current={plane === shown ? "true" : undefined}
              >
                {word}
              </Link>
            ) : (
              <span key={plane} className="choice-off" aria-disabled="true">
                {word}
                <span className="sr-only">: needs {lacks}</span>
              </span>
            ),
          )}
        </nav>
        {choices && (
          <div className="flex flex-wrap gap-2 no-print">
            {/* What was kept closes its dialog: a new key is a new one, closed. */}
            <BenchDialog key={`bench ${data.analysis.number}`} data={data} choices={choices} />
            <FeedlineDialog
              key={`line ${data.analysis.number} ${view.plane} ${JSON.stringify(correction.feedline)}`}
              data={data}
              choices={choices}
              errors={errors}
            />
          </div>
        )}
      </div>
      <p className="text-small">
        <CorrectionLine data={data} />
      </p>
      {missing.length > 0 && (
        <p className="text-small soft">
          {missing.map(({ word, missing: lacks }) => `“${word}” needs ${lacks}.`).join(" ")}
        </p>
      )}
      {correction.problem && <p className="text-small text-clay">{correction.problem}</p>}
      {correction.changed && <ChangedSince data={data} />}
    </section>
  );
}

function CorrectionLine({ data: { correction, project } }: { data: SweepPageData }) {
  const { words, bench, grey } = correction;
  return (
    <>
      {words}{" "}
      {grey &&
        "The grey dashes are as measured, where the correction does not hold; no dips are looked for there. "}
      {bench && <Link to={`/projects/${project.publicId}/benches/${bench.publicId}`}>See the bench</Link>}
    </>
  );
}

function ChangedSince({ data: { correction, may } }: { data: SweepPageData }) {
  const navigation = useNavigation();
  return (
    <div className="panel border-l-3 border-l-clay flex flex-wrap items-center justify-between gap-3 text-small">
      <p className="max-w-[60ch]">
        {correction.changed} Nothing was computed anew: the dips stand as they were found.
      </p>
      {may.edit && (
        <Form method="post" preventScrollReset>
          <input type="hidden" name="intent" value="anew" />
          <Button size="small" busy={navigation.formData?.get("intent") === "anew"}>
            Analyse anew
          </Button>
        </Form>
      )}
    </div>
  );
}
