import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { Result, ResultGroup, ResultKind } from "~/services/search.server";

export interface GroupsProps {
  groups: ResultGroup[];
  /** The kind that is shown alone, a page at a time. */
  only: ResultKind | null;
  typed: Record<string, string | undefined>;
}

/** What was found, a section a kind. */
export function Groups({ groups, only, typed }: GroupsProps) {
  const address = (more: Record<string, string>) => {
    const { cursor: _, in: __, ...kept } = typed;
    const given = Object.entries({ ...kept, ...more }).filter(([, value]) => value);
    return `/search?${new URLSearchParams(given as [string, string][])}`;
  };
  return (
    <>
      {only && (
        <p>
          <Link to={address({})}>All kinds</Link>
        </p>
      )}
      {groups.map(({ kind, results, nextCursor }) => (
        <section key={kind} aria-labelledby={`found-${kind}`} className="grid gap-3">
          <h2 id={`found-${kind}`}>{HEADINGS[kind]}</h2>
          <ul className="results">
            {results.map((result) => (
              <Found key={result.to} result={result} />
            ))}
          </ul>
          {nextCursor && (
            <p>
              <Link
                to={address(only || results.length > A_FEW ? { in: kind, cursor: nextCursor } : { in: kind })}
              >
                {only || results.length > A_FEW ? `Older ${kind}` : `All ${kind}`}
              </Link>
            </p>
          )}
        </section>
      ))}
    </>
  );
}

function Found({ result }: { result: Result }) {
  return (
    <li className="result">
      <p className="flex flex-wrap items-baseline justify-between gap-x-4">
        <Link to={result.to} className="font-semibold">
          {result.title}
        </Link>
        <span className="text-small soft">
          <DateTime at={result.at} dateOnly />
        </span>
      </p>
      {result.snippet.length > 0 && (
        <p className="result-snippet">
          {result.snippet.map(({ text, marked }, i) =>
            // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one text never change places
            marked ? <mark key={i}>{text}</mark> : text,
          )}
        </p>
      )}
      <p className="text-small soft">{result.place}</p>
    </li>
  );
}

/** Of each kind where several are shown. */
const A_FEW = 5;

const HEADINGS: Record<ResultKind, string> = {
  dips: "Dips",
  notes: "Notes",
  sweeps: "Sweeps",
  steps: "Steps",
  trails: "Trails",
  plates: "Plates",
  "write-ups": "Write-ups",
  antennas: "Antennas",
  projects: "Projects",
  people: "People",
};
