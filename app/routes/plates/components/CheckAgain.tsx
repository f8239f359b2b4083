import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { Table } from "~/components/ui/Table";
import type { CheckOutcome } from "~/services/plates/check.server";

/** Computes the plate again from its originals, and says what came of it where it was asked. */
export function CheckAgain({ checked, problem }: { checked: CheckOutcome | null; problem: string | null }) {
  const busy = useNavigation().formData?.get("intent") === "check";
  return (
    <section aria-labelledby="check" className="grid gap-3 justify-items-start" id="checked">
      <h3 id="check">Does it still come out so?</h3>
      <p className="text-small soft max-w-[72ch]">
        Everything is read and analysed again from the stored originals, with the settings above and the
        method of today, and held against what is frozen here. Nothing is changed.
      </p>
      <Form method="post" action="#checked" preventScrollReset>
        <Button variant="quiet" name="intent" value="check" busy={busy} icon="check">
          Check again
        </Button>
      </Form>
      <div role="status" className="grid gap-3 w-full">
        {busy && <p>Computing it again from the originals…</p>}
        {!busy && problem && <p className="text-alarm">{problem}</p>}
        {!busy && checked && <Outcome checked={checked} />}
      </div>
    </section>
  );
}

function Outcome({ checked }: { checked: CheckOutcome }) {
  if (checked.same) {
    return (
      <p className="panel border-l-3 border-l-moss">
        <strong>Identical.</strong> Every number of this plate came out again as it is frozen.
      </p>
    );
  }
  const { differences } = checked;
  return (
    <div className="panel border-l-3 border-l-clay grid gap-3">
      <p>
        <strong>
          {differences.length === 1 ? "One thing differs." : `${differences.length} things differ.`}
        </strong>{" "}
        The plate stays as it was frozen.
      </p>
      <Table
        caption="What differs"
        rows={differences.map((difference, index) => ({ ...difference, index }))}
        rowKey={({ index }) => String(index)}
        columns={[
          { key: "what", label: "What", cell: ({ what }) => what },
          { key: "frozen", label: "Frozen", numeric: true, cell: ({ frozen }) => frozen ?? "unknown" },
          { key: "now", label: "Now", numeric: true, cell: ({ now }) => now ?? "unknown" },
          { key: "why", label: "Why", cell: ({ why }) => why },
        ]}
      />
    </div>
  );
}
