import { frequencyAxis, frequencyScale } from "~/charts/axis";
import { FrequencyAxisMarks } from "~/charts/FrequencyAxisMarks";
import { Profile } from "~/charts/Profile";
import { PAGE_PALETTE } from "~/charts/palette";
import type { TriedReading } from "~/services/reading-preview.server";

function CurveAxis({ frequencyHz }: { frequencyHz: ArrayLike<number> }) {
  const axis = frequencyAxis(frequencyScale("linear", frequencyHz[0], frequencyHz[frequencyHz.length - 1]));
  return (
    <div className="chart-frame">
      <div className="shared-axis">
        <svg width="100%" height="24" overflow="visible" aria-hidden="true">
          <FrequencyAxisMarks frequency={axis} y={1} plotWidthPx={null} palette={PAGE_PALETTE} />
        </svg>
        <p className="number soft">{axis.caption}; return loss downwards</p>
      </div>
    </div>
  );
}

/** Nothing is wrong with the file: only a number is missing that a person can give. */
function asks(problem: { code: string }): boolean {
  return problem.code === "zero-db-needed";
}

/** What the reading gives: the curve, its dips, what was assumed; or what stands in its way. */
export function TriedView({ tried, busy }: { tried: TriedReading; busy: boolean }) {
  return (
    <section
      aria-label="What the reading gives"
      aria-busy={busy}
      className={`grid gap-4 ${busy ? "waiting relative" : ""}`}
    >
      {tried.problem && (
        <div
          role="alert"
          className={`panel border-l-4 grid gap-1 ${asks(tried.problem) ? "border-l-clay" : "border-l-alarm"}`}
        >
          <p className={`font-semibold ${asks(tried.problem) ? "text-clay" : "text-alarm"}`}>
            {tried.problem.message}
          </p>
          {tried.problem.line && !/^Line \d/.test(tried.problem.message) && (
            <p className="text-small">
              Line {tried.problem.line}
              {tried.problem.column ? `, column ${tried.problem.column}` : ""}
            </p>
          )}
        </div>
      )}
      {tried.profile && (
        <>
          {tried.profile.points.magnitude.some(Number.isFinite) ? (
            <div className="grid">
              <Profile {...tried.profile} heightPx={200} />
              <CurveAxis frequencyHz={tried.profile.points.frequencyHz} />
            </div>
          ) : (
            <p className="panel soft">
              No point has a value that can be drawn: these columns or this quantity do not fit.
            </p>
          )}
          <p className="text-small">
            <span className="font-mono">{tried.points?.toLocaleString("en")}</span> points,{" "}
            <span className="font-mono">{tried.span}</span>.{" "}
            {tried.dips.length === 0 ? (
              "No dips."
            ) : (
              <>
                Dips:{" "}
                <span className="font-mono">
                  {tried.dips.map((dip) => `${dip.frequency} (SWR ${dip.swr})`).join(", ")}
                </span>
              </>
            )}
          </p>
        </>
      )}
      {tried.reading && tried.reading.assumed.length > 0 && (
        <div>
          <h3>What the file did not say</h3>
          <ul className="list-disc pl-5 text-small">
            {tried.reading.assumed.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        </div>
      )}
      {tried.warnings.map((warning) => (
        <p key={warning} className="text-small text-clay">
          {warning}
        </p>
      ))}
    </section>
  );
}
