import { LimitSources } from "~/components/LimitSources";
import { formatFrequency } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";

/** Dip by dip, what its limits come from; what is unknown of all of them is said once. */
export function LimitList({ data }: { data: SweepPageData }) {
  const { correction, project } = data;
  const dips = data.dips.filter((dip) => !dip.edge && (dip.shares.length > 0 || dip.unknown.length > 0));
  if (dips.length === 0) return null;
  const benchHref = correction.bench && `/projects/${project.publicId}/benches/${correction.bench.publicId}`;
  const unknown = dips[0].unknown.filter((one) => dips.every((dip) => dip.unknown.some(same(one))));
  return (
    <details className="text-small">
      <summary className="note-action">What limits these numbers</summary>
      <div className="grid gap-2 pt-2 max-w-[72ch]">
        <LimitSources dip={{ shares: [], unknown }} benchHref={benchHref} />
        {dips
          .map((dip) => ({ ...dip, unknown: dip.unknown.filter((one) => !unknown.some(same(one))) }))
          .filter((dip) => dip.shares.length > 0 || dip.unknown.length > 0)
          .map((dip) => (
            <div key={dip.publicId ?? dip.frequencyHz} className="grid gap-x-4 sm:grid-cols-[8rem_1fr]">
              <span className="font-mono">
                {formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}
              </span>
              <LimitSources dip={dip} benchHref={benchHref} />
            </div>
          ))}
      </div>
    </details>
  );
}

function same(one: { source: string; remedy: string }) {
  return (other: { source: string; remedy: string }) =>
    other.source === one.source && other.remedy === one.remedy;
}
