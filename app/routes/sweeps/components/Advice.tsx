import { formatFrequency } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";

/** What the analysis warns of, and what to sweep again. */
export function Advice({ data }: { data: SweepPageData }) {
  const again = data.dips.filter((dip) => dip.advice !== null);
  const warnings = data.warnings.filter(
    (warning) => again.length === 0 || warning.code !== "few-points-in-dip",
  );
  if (again.length === 0 && warnings.length === 0) return null;
  return (
    <section aria-label="What to mind" className="grid gap-1 text-small">
      {again.map(
        ({ advice, frequencyHz }) =>
          advice && (
            <p key={frequencyHz}>
              <strong className="text-clay">Too few points</strong> in the dip at{" "}
              <span className="font-mono">{formatFrequency(frequencyHz, null)}</span>: sweep again over{" "}
              <span className="font-mono">
                {formatFrequency(advice.startHz, null)} – {formatFrequency(advice.stopHz, null)}
              </span>{" "}
              with <span className="font-mono">{advice.points}</span> points.
            </p>
          ),
      )}
      {warnings.map((warning) => (
        <p key={`${warning.code} ${warning.message}`} className="soft">
          {warning.message}
        </p>
      ))}
    </section>
  );
}
