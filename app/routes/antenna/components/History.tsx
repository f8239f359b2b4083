import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { AntennaPage } from "../antenna-page.server";

/** Every change of the antenna with its day, the newest first; each leads to the antenna as it was from then on. */
export function History({ projectId, history }: { projectId: string; history: AntennaPage["history"] }) {
  const base = `/projects/${projectId}`;
  return (
    <section aria-labelledby="history" className="grid gap-3">
      <h2 id="history">What changed, and when</h2>
      <ol className="grid gap-3">
        {history.map((version) => (
          <li
            key={version.publicId}
            className={`border-l-3 pl-3 ${version.shown ? "border-fen" : "border-rule"}`}
          >
            <p className="flex flex-wrap gap-x-3">
              <Link
                to={`?on=${minuteOf(version.validFrom)}`}
                aria-current={version.shown ? "true" : undefined}
                className="font-semibold"
              >
                <DateTime at={version.validFrom} />
              </Link>
              {version.shown && <span className="text-small text-fen self-center">shown</span>}
            </p>
            {version.step ? (
              <p>
                Step: <Link to={`${base}/steps/${version.step.publicId}`}>{version.step.title}</Link>
              </p>
            ) : (
              version.remark && <p>{version.remark}</p>
            )}
            <ul className="text-small">
              {version.changes.map((line) => (
                <li key={line}>{line}</li>
              ))}
              {version.changes.length === 0 && <li className="soft">nothing else than before</li>}
            </ul>
            <p className="text-small soft">{version.by ?? "former member"}</p>
          </li>
        ))}
      </ol>
    </section>
  );
}

/** To the minute, upwards, so that the version itself is in it. */
function minuteOf(at: Date | string): string {
  return new Date(at).toISOString().slice(0, 16);
}
