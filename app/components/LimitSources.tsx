import { Link } from "react-router";
import { shareWords } from "~/measurement/limits/shares";
import type { Dip, Unknown } from "~/measurement/sweep";

interface LimitSourcesProps {
  dip: Pick<Dip, "shares" | "unknown">;
  /** The page of the bench, where unknown errors can be made known; null where no bench is said. */
  benchHref: string | null;
}

/** What the limits of a dip's lowest SWR come from, with their shares, and what would make the unknown known. */
export function LimitSources({ dip, benchHref }: LimitSourcesProps) {
  return (
    <div className="grid gap-1">
      {dip.shares.length > 0 && (
        <p>
          {capital(shareWords(dip.shares))}. <Link to="/methods#uncertainty">How they are reckoned</Link>
        </p>
      )}
      {byRemedy(dip.unknown).map(({ sources, remedy }) => (
        <p key={remedy} className="soft">
          <span className="text-clay">{capital(sources.join(" and "))}: unknown</span>; {remedy}.{" "}
          {benchHref && remedy.includes("bench") && <Link to={benchHref}>See the bench</Link>}
        </p>
      ))}
    </div>
  );
}

function byRemedy(unknown: readonly Unknown[]) {
  return [...new Set(unknown.map(({ remedy }) => remedy))].map((remedy) => ({
    remedy,
    sources: unknown.filter((one) => one.remedy === remedy).map(({ source }) => source),
  }));
}

function capital(text: string): string {
  return text[0].toUpperCase() + text.slice(1);
}
