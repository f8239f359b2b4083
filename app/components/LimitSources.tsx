import { Link } from "react-router";
import type { Dip, LimitSource } from "~/measurement/sweep";

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
          Limits from{" "}
          {dip.shares.map(({ source, share }, i) => (
            <span key={source}>
              {i > 0 && ", "}
              {SOURCES[source]} <span className="font-mono">{percent(share)}</span>
            </span>
          ))}
          . <Link to="/methods#uncertainty">How they are reckoned</Link>
        </p>
      )}
      {dip.unknown.map(({ source, remedy }) => (
        <p key={source} className="soft">
          <span className="text-clay">{capital(SOURCES[source])}: unknown.</span> {remedy}{" "}
          {benchHref && BENCH_SOURCES.has(source) && <Link to={benchHref}>See the bench</Link>}
        </p>
      ))}
    </div>
  );
}

/** Under a per cent is said so: a source that is there is not nothing. */
function percent(share: number): string {
  const whole = Math.round(share * 100);
  return whole === 0 && share > 0 ? "under 1\u2009%" : `${whole}\u2009%`;
}

function capital(text: string): string {
  return text[0].toUpperCase() + text.slice(1);
}

const SOURCES: Record<LimitSource, string> = {
  directivity: "directivity",
  tracking: "0 dB line",
  match: "test-port match",
  noise: "noise",
  fit: "fit",
  step: "frequency step",
  pixel: "pixel of the picture",
  feedline: "feedline",
};
const BENCH_SOURCES = new Set<LimitSource>(["directivity", "tracking", "match"]);
