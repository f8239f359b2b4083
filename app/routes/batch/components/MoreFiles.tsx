import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { FILE_LOOK } from "../words";

/** A file that is missing or mended, or a table that is: what has the same name takes its place. */
export function MoreFiles({ base, batch }: { base: string; batch: string }) {
  const busy = useNavigation().formData?.get("intent") === "add";
  return (
    <section aria-labelledby="more" className="grid grid-cols-1 gap-3">
      <h3 id="more">Send more for this batch</h3>
      <p className="soft max-w-[72ch]">
        A file that is missing, or one that you have mended under the same name; or the table anew, which then
        counts in place of the one before.
      </p>
      <Form
        method="post"
        action={`${base}/sweeps/batch/${batch}`}
        encType="multipart/form-data"
        className="panel flex flex-wrap items-end gap-5"
      >
        <input type="hidden" name="intent" value="add" />
        <label className="grid grid-cols-1 gap-1 min-w-0 max-w-full">
          <span className="font-semibold">Files</span>
          <input type="file" name="files" multiple className={FILE_LOOK} />
        </label>
        <label className="grid grid-cols-1 gap-1 min-w-0 max-w-full">
          <span className="font-semibold">The table (CSV)</span>
          <input type="file" name="table" accept=".csv,.tsv,.txt,text/csv" className={FILE_LOOK} />
        </label>
        <Button variant="quiet" busy={busy}>
          Send
        </Button>
      </Form>
    </section>
  );
}
