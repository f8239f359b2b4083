import { Form, Link } from "react-router";
import { Button, LinkButton } from "~/components/ui/Button";
import { type Column, Table } from "~/components/ui/Table";
import { Tag, type Tone } from "~/components/ui/Tag";
import type { RowResult } from "~/services/batch/report";
import type { ShownBatch, ShownRow } from "../run-page.server";
import { countOf } from "../words";

/** What became of each row, with where to go on. */
export function Results({ batch, base }: { batch: ShownBatch; base: string }) {
  const rows = batch.rows.filter(({ result }) => result !== null);
  const of = (...kinds: RowResult["kind"][]) =>
    rows.filter(({ result }) => result && kinds.includes(result.kind)).length;
  const failed = of("failed");
  const left = batch.rows.filter(({ leftOut }) => leftOut).length;
  return (
    <section aria-labelledby="results" className="grid grid-cols-1 gap-4">
      <h3 id="results">What became of them</h3>
      <p>
        {countOf(of("read", "unread"), "sweep")} taken in
        {of("unread") > 0 && `, ${of("unread")} of them still to be read`}
        {of("twice") > 0 && `; ${of("twice")} already here`}
        {failed + of("refused") > 0 && `; ${failed + of("refused")} not taken in`}
        {left > 0 && `; ${left} left out`}.
      </p>
      {batch.phase === "done" && (
        <div className="flex flex-wrap gap-3">
          <LinkButton to={`${base}/dips`}>See their dips in the table</LinkButton>
          <LinkButton to={`${base}/sweeps`} variant="quiet">
            All sweeps
          </LinkButton>
          {failed > 0 && (
            <Form method="post">
              <Button name="intent" value="take" variant="quiet">
                Try {failed === 1 ? "the one that failed" : `the ${failed} that failed`} again
              </Button>
            </Form>
          )}
        </div>
      )}
      {rows.length > 0 && (
        <Table
          caption="What became of each row"
          columns={columnsFor(base)}
          rows={rows}
          rowKey={({ index }) => String(index)}
        />
      )}
    </section>
  );
}

function columnsFor(base: string): Column<ShownRow>[] {
  return [
    { key: "file", label: "File", cell: ({ name }) => <span className="break-all">{name}</span> },
    {
      key: "sweep",
      label: "Sweep",
      cell: ({ result }) =>
        result?.sweep ? (
          <Link to={`${base}/sweeps/${result.sweep}${result.kind === "unread" ? "/reading" : ""}`}>
            {result.title}
          </Link>
        ) : (
          <span className="soft">none</span>
        ),
    },
    {
      key: "outcome",
      label: "Outcome",
      cell: ({ result }) =>
        result && (
          <span className="inline-flex flex-wrap items-baseline gap-2">
            <Tag tone={LOOK[result.kind].tone}>{LOOK[result.kind].word}</Tag>
            <span className="text-small">{result.words}</span>
          </span>
        ),
    },
  ];
}

const LOOK: Record<RowResult["kind"], { tone: Tone; word: string }> = {
  read: { tone: "moss", word: "taken in" },
  unread: { tone: "clay", word: "to be read" },
  twice: { tone: "plain", word: "already here" },
  refused: { tone: "alarm", word: "not taken in" },
  failed: { tone: "alarm", word: "failed" },
};
