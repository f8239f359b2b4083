import { type FormEvent, useState } from "react";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import { FILE_LOOK } from "../words";
import { useBatchUpload } from "./use-batch-upload";

/** A folder, files or a ZIP, and a table. Without scripts the form goes as one; with them in pieces that can be followed. */
export function BatchForm({ base, batch }: { base: string; batch: string }) {
  const hydrated = useHydrated();
  const [empty, setEmpty] = useState(false);
  const { state, send } = useBatchUpload(base, batch);
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const of = (name: string) =>
      form.getAll(name).filter((entry): entry is File => entry instanceof File && entry.name !== "");
    const files = of("files");
    const [table] = of("table");
    setEmpty(files.length === 0);
    if (files.length > 0) send(files, table ?? null);
  };
  const busy = state.kind === "sending" || state.kind === "checking";
  return (
    <form
      method="post"
      encType="multipart/form-data"
      className="panel grid gap-5 justify-items-start"
      onSubmit={hydrated ? submit : undefined}
      aria-label="Files of the batch"
    >
      <input type="hidden" name="batch" value={batch} />
      <div className="grid gap-5 sm:grid-cols-2 w-full">
        <FileField label="A folder" hint="Everything in it, with the folders inside." folder />
        <FileField label="Files, or a ZIP" hint="As many as you like." />
        <FileField label="The table (CSV)" hint="If you have one." table />
      </div>
      <Button icon="upload" busy={busy}>
        Send and check
      </Button>
      <div role="status" className="grid gap-2 w-full empty:hidden">
        {state.kind === "sending" && (
          <>
            <progress className="progress" max={1} value={state.share} aria-label="Progress of the batch" />
            <p className="text-small soft">
              {Math.round(state.share * 100)} % of {state.files} {state.files === 1 ? "file" : "files"} sent
            </p>
          </>
        )}
        {state.kind === "checking" && <p className="text-small soft">Sent; being unpacked and looked at.</p>}
      </div>
      {state.kind === "failed" && (
        <p role="alert" className="text-alarm">
          {state.message}
        </p>
      )}
      {empty && !busy && (
        <p role="alert" className="text-alarm">
          No file was chosen. Choose a folder, some files or a ZIP.
        </p>
      )}
    </form>
  );
}

interface FileFieldProps {
  label: string;
  hint: string;
  folder?: boolean;
  table?: boolean;
}

function FileField({ label, hint, folder = false, table = false }: FileFieldProps) {
  return (
    <label className="grid gap-1 content-start min-w-0">
      <span className="font-semibold">{label}</span>
      <input
        type="file"
        name={table ? "table" : "files"}
        multiple={!table}
        accept={table ? ".csv,.tsv,.txt,text/csv" : undefined}
        className={FILE_LOOK}
        // The name is the standard's own; React passes it on as it is.
        {...(folder && { webkitdirectory: "" })}
      />
      <span className="text-small soft">{hint}</span>
    </label>
  );
}
