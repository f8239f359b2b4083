import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import { VerdictTag } from "~/components/ui/Tag";
import type { Evidence } from "~/db/schema";
import type { DipPageData } from "../dip-page.server";

/** Every verdict that was given, newest first: who, when and on what evidence. */
export function VerdictHistory({ data: { judgement, projectId } }: { data: DipPageData }) {
  const { history } = judgement;
  if (history.length === 0) return null;
  return (
    <details className="verdict-history" open={history.length < 4}>
      <summary>How it came to this</summary>
      <ol className="grid gap-3 text-small" aria-label="Verdicts so far, newest first">
        {history.map(({ publicId, verdict, text, by, at, evidence, ofTrail }) => (
          <li key={publicId} className="verdict-event">
            <p>
              <VerdictTag verdict={verdict} />
            </p>
            <div className="grid gap-1 min-w-0">
              <p>{text}</p>
              <p className="soft">
                {by ?? "former member"}, <DateTime at={at} />
                {ofTrail && ", on the trail"}
              </p>
              <EvidenceList evidence={evidence} projectId={projectId} />
            </div>
          </li>
        ))}
      </ol>
    </details>
  );
}

/** What a verdict rested on, as it read then, with links to what is there now. */
export function EvidenceList({ evidence, projectId }: { evidence: Evidence[]; projectId: string }) {
  if (evidence.length === 0) return null;
  return (
    <ul className="list-disc pl-5" aria-label="On the evidence of">
      {evidence.map((one) => (
        <li key={`${one.kind} ${one.id}`}>
          <span className="soft">{KIND_WORDS[one.kind]}</span>{" "}
          <EvidenceLine one={one} projectId={projectId} />
        </li>
      ))}
    </ul>
  );
}

function EvidenceLine({ one: { kind, id, text }, projectId }: { one: Evidence; projectId: string }) {
  const base = `/projects/${projectId}`;
  switch (kind) {
    case "sweep":
      return <Link to={`${base}/sweeps/${id}`}>{text}</Link>;
    case "step":
      return <Link to={`${base}/steps/${id}`}>{text}</Link>;
    case "dip":
      return <Link to={`${base}/dips/${id}`}>{text}</Link>;
    case "note":
      return <a href={`#note-${id}`}>{text}</a>;
    case "cause":
      return <>{text}</>;
    default:
      return kind satisfies never;
  }
}

const KIND_WORDS = { cause: "Reckoned:", sweep: "Sweep", step: "Step", note: "Note by", dip: "Dip" } as const;
