import { DateTime } from "~/components/ui/DateTime";
import type { ShownBatch } from "../run-page.server";
import { countOf } from "../words";

/** What came, and what the table says of all of it. */
export function Arrived({ batch }: { batch: ShownBatch }) {
  const { rows, table, passedOver, expiresAt, phase } = batch;
  return (
    <div className="grid gap-2 max-w-[72ch]">
      <p>
        {countOf(rows.length, "row")}
        {table && !table.problem ? `, with the table “${table.name}”` : ", without a table"}.
        {passedOver > 0 && ` ${countOf(passedOver, "file")} of the system passed over.`}{" "}
        {phase !== "done" && expiresAt && (
          <span className="soft">
            Kept until <DateTime at={expiresAt} dateOnly /> if you leave it here.
          </span>
        )}
      </p>
      {table?.problem && (
        <p role="alert" className="text-alarm">
          {table.problem} It was not used: mend it and send it again below.
        </p>
      )}
      {table?.remarks.map((remark) => (
        <p key={remark} className="text-small soft">
          {remark}
        </p>
      ))}
      {phase === "receiving" && (
        <p className="soft">
          Sending was broken off. Send the same files again: what is here already is known.
        </p>
      )}
    </div>
  );
}
