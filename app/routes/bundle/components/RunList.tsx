import { useEffect } from "react";
import { Form, Link, useRevalidator } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Icon } from "~/components/ui/Icon";
import { sizeWords } from "~/services/note-words";

export interface Run {
  id: string;
  /** "gone": it was made, and is not kept any more. */
  state: "waiting" | "running" | "done" | "failed" | "gone";
  createdAt: string;
  /** Of the work, 0 to 1; null while that is not known. */
  share: number | null;
  /** Something failed, and it is tried again. */
  again: boolean;
  offer: { name: string; sizeBytes: number; files: number; until: string } | null;
  /** Why it failed, each in a sentence. */
  faults: string[];
  records: number | null;
  project: { id: string; title: string } | null;
}

export interface RunListProps {
  runs: Run[];
  /** Address of a download, before the run's id. */
  base: string;
  verb: { doing: string; failed: string };
}

/** What was asked for, newest first; looks again by itself while one is under way. */
export function RunList({ runs, base, verb }: RunListProps) {
  const open = runs.some(({ state }) => state === "waiting" || state === "running");
  const { revalidate } = useRevalidator();
  useEffect(() => {
    if (!open) return;
    const timer = setInterval(() => void revalidate(), LOOK_EVERY_MS);
    return () => clearInterval(timer);
  }, [open, revalidate]);
  return (
    <ul className="bundle-runs">
      {runs.map((run) => (
        <li key={run.id} className="panel space-y-2">
          <RunBody run={run} base={base} verb={verb} />
        </li>
      ))}
    </ul>
  );
}

function RunBody({ run, base, verb }: Omit<RunListProps, "runs"> & { run: Run }) {
  switch (run.state) {
    case "waiting":
    case "running":
      return <Underway run={run} doing={verb.doing} />;
    case "failed":
      return <Failed run={run} words={verb.failed} />;
    case "gone":
      return (
        <p className="soft">
          Made <DateTime at={run.createdAt} />. It is not kept any more; make another one.
        </p>
      );
    case "done":
      return run.offer ? <Offer run={run} offer={run.offer} base={base} /> : <TakenIn run={run} />;
    default:
      return run.state satisfies never;
  }
}

function Underway({ run, doing }: { run: Run; doing: string }) {
  const label = run.share === null ? doing : `${doing}, ${Math.floor(run.share * 100)} %`;
  return (
    <div role="status" className="space-y-2">
      <p>
        {label}
        {run.again && " (something failed a moment ago; it is tried again)"}
      </p>
      <progress className="bundle-progress" aria-label={doing} max={1} value={run.share ?? undefined} />
      <p className="soft text-small">
        You may leave this page; it goes on. Begun <DateTime at={run.createdAt} />.{" "}
        <Link to="." reloadDocument>
          Look again
        </Link>
      </p>
    </div>
  );
}

function Offer({ run, offer, base }: { run: Run; offer: NonNullable<Run["offer"]>; base: string }) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
      <div>
        <p className="font-semibold break-all">{offer.name}</p>
        <p className="soft text-small">
          {sizeWords(offer.sizeBytes)}, {offer.files} files. Made <DateTime at={run.createdAt} />, kept until{" "}
          <DateTime at={offer.until} dateOnly />.
        </p>
      </div>
      <div className="flex flex-wrap gap-3">
        <a className="button button-primary" href={`${base}/${run.id}`} download>
          <Icon name="download" />
          Download
        </a>
        <RemoveForm run={run} words="Remove it" />
      </div>
    </div>
  );
}

function TakenIn({ run }: { run: Run }) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
      <p>
        {run.project ? (
          <>
            Taken in: <Link to={`/projects/${run.project.id}`}>{run.project.title}</Link>
          </>
        ) : (
          "Taken in; the project was deleted since."
        )}
        <span className="soft text-small block">
          {run.records !== null && `${run.records} ${run.records === 1 ? "record" : "records"}, `}
          <DateTime at={run.createdAt} />
        </span>
      </p>
      <RemoveForm run={run} words="Clear this line" />
    </div>
  );
}

function Failed({ run, words }: { run: Run; words: string }) {
  return (
    <div className="space-y-2 border-l-3 border-alarm pl-4">
      <p className="font-semibold">{words}</p>
      <ul className="list-disc pl-5">
        {run.faults.map((fault) => (
          <li key={fault} className="break-words">
            {fault}
          </li>
        ))}
      </ul>
      <RemoveForm run={run} words="Clear this line" />
    </div>
  );
}

function RemoveForm({ run, words }: { run: Run; words: string }) {
  return (
    <Form method="post">
      <input type="hidden" name="run" value={run.id} />
      <Button variant="quiet" name="intent" value="remove">
        {words}
      </Button>
    </Form>
  );
}

const LOOK_EVERY_MS = 2000;
