import { Link } from "react-router";
import { Icon, type IconName } from "~/components/ui/Icon";
import type { UploadResult } from "../take-uploads.server";

const LOOK: Record<UploadResult["kind"], { icon: IconName; tone: string; word: string }> = {
  read: { icon: "check", tone: "text-moss", word: "Read" },
  unread: { icon: "edit", tone: "text-clay", word: "To be read" },
  twice: { icon: "file", tone: "text-soft", word: "Already here" },
  refused: { icon: "warning", tone: "text-alarm", word: "Not taken" },
  failed: { icon: "warning", tone: "text-alarm", word: "Failed" },
};

/** What became of each file, with where to go on. */
export function UploadResults({ results }: { results: UploadResult[] }) {
  return (
    <ul className="grid gap-2" aria-label="What became of the files">
      {results.map((result, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: two files may have one name; the list only grows
        <li key={i} className="panel">
          <ResultLine result={result} />
        </li>
      ))}
    </ul>
  );
}

export function ResultLine({ result }: { result: UploadResult }) {
  const look = LOOK[result.kind];
  return (
    <div className="grid grid-cols-[auto_1fr] gap-x-3 items-start">
      <span className={look.tone}>
        <Icon name={look.icon} />
      </span>
      <div className="min-w-0">
        <p className="break-words">
          {result.href ? (
            <Link to={result.href} className="font-semibold">
              {result.title}
            </Link>
          ) : (
            <span className="font-semibold">{result.title}</span>
          )}{" "}
          <span className={`text-small ${look.tone}`}>{look.word}</span>
        </p>
        <p className="text-small soft break-words">{result.message}</p>
      </div>
    </div>
  );
}
