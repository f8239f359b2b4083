import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import type { ShownBatch } from "../run-page.server";
import { countOf } from "../words";
import { RowFields } from "./RowFields";

export interface RowsToMendProps {
  batch: ShownBatch;
  /** A row that a person wants to change although nothing stands in its way. */
  edit: number | null;
  base: string;
}

/** Each row that something stands in the way of, with what it takes to mend it; then the button that takes all in. */
export function RowsToMend({ batch, edit, base }: RowsToMendProps) {
  const busy = useNavigation().state === "submitting";
  const stuck = batch.rows.filter(({ problems }) => problems.length > 0);
  const all = batch.rows.filter(({ index, problems }) => problems.length > 0 || index === edit);
  const open = [
    ...all.filter(({ index }) => index === edit),
    ...all.filter(({ index }) => index !== edit),
  ].slice(0, MOST_AT_ONCE);
  const wanted = batch.rows.filter(({ leftOut, result }) => !leftOut && result === null);
  return (
    <div className="grid grid-cols-1 gap-6">
      <div className="flex flex-wrap items-center gap-3">
        <Form method="post">
          <Button name="intent" value="take" disabled={stuck.length > 0 || wanted.length === 0} busy={busy}>
            Take in {countOf(wanted.length - stuck.length, "sweep")}
          </Button>
        </Form>
        <Form method="post">
          <Button name="intent" value="give-up" variant="quiet">
            Give the batch up
          </Button>
        </Form>
        {stuck.length > 0 && (
          <span className="text-clay">{countOf(stuck.length, "row")} to be mended or left out first</span>
        )}
      </div>
      {open.length > 0 && (
        <section aria-labelledby="to-mend" className="grid grid-cols-1 gap-4">
          <div className="flex flex-wrap items-center justify-between gap-3">
            <h3 id="to-mend">To be mended or left out</h3>
            {stuck.length > 1 && (
              <Form method="post">
                <Button name="intent" value="leave-out" variant="quiet" size="small">
                  Leave out all {stuck.length}
                </Button>
              </Form>
            )}
          </div>
          <Form method="post" className="grid grid-cols-1 gap-3" key={open.map(({ index }) => index).join()}>
            {open.map((row) => (
              <RowFields key={row.index} row={row} batch={batch} base={base} />
            ))}
            {all.length > open.length && (
              <p>
                And {countOf(all.length - open.length, "row")} more: they are asked for once these are mended
                or left out.
              </p>
            )}
            <div>
              <Button name="intent" value="mend" busy={busy}>
                Keep and check again
              </Button>
            </div>
          </Form>
        </section>
      )}
    </div>
  );
}

/** Each is a form of its own with every file that it may be of. */
const MOST_AT_ONCE = 50;
