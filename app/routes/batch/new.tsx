import { useState } from "react";
import { data, Link, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { DateTime } from "~/components/ui/DateTime";
import { Icon } from "~/components/ui/Icon";
import * as batches from "~/db/batches.server";
import { newPublicId } from "~/db/ids.server";
import { readUploadForm } from "~/routes/sweeps/take-uploads.server";
import type { Route } from "./+types/new";
import { receiveForm } from "./batch-form.server";
import { BatchForm } from "./components/BatchForm";

export const meta: Route.MetaFunction = () => [{ title: "Add many sweeps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "sweep.add");
  const runs = await batches.findAllByProject(project.id);
  return {
    project: { publicId: project.publicId },
    batch: newPublicId(),
    open: runs.filter(({ state }) => state !== "done"),
  };
}

/** The plain form: everything at once. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const batch = await receiveForm(access, await readUploadForm(args.request), { last: true });
  if (!batch) return data({ error: NOTHING_CHOSEN }, 400);
  return redirect(`/projects/${access.project.publicId}/sweeps/batch/${batch}`);
}

export default function NewBatch({ loaderData, actionData }: Route.ComponentProps) {
  const { project, open } = loaderData;
  const base = `/projects/${project.publicId}/sweeps`;
  // The first id that came with the page: one form, one batch, whatever is loaded anew meanwhile.
  const [batch] = useState(loaderData.batch);
  return (
    <section className="grid gap-6 max-w-[56rem]" aria-labelledby="batch">
      <div className="grid gap-2">
        <Breadcrumbs items={[{ label: "Sweeps", to: base }]} />
        <h2 id="batch" className="sweep-title">
          Add many sweeps at once
        </h2>
        <p className="soft max-w-[72ch]">
          A folder, some files or a ZIP, with a table of titles, days, benches and steps if you like. All of
          it is checked first: nothing becomes a sweep before you have seen what would. Up to 300 files of 64
          MB each; a ZIP up to 130 MB.
        </p>
      </div>
      <BatchForm base={base} batch={batch} />
      {actionData?.error && (
        <p role="alert" className="text-alarm">
          {actionData.error}
        </p>
      )}
      <section aria-labelledby="batch-table" className="grid gap-2">
        <h3 id="batch-table">The table</h3>
        <p className="soft max-w-[72ch]">
          One line a file: <b>file</b> is its name (with its folder where two have the same), <b>taken at</b>{" "}
          a day or a day and time in UTC such as 2026-09-14 17:20, <b>bench</b> and <b>step</b> by their names
          here. What is left empty is not said. Without a table, titles come from the files' names.
        </p>
        <p>
          <a
            href={`${base}/batch/template.csv`}
            download
            className="inline-flex items-center gap-2 min-h-[1.5rem]"
          >
            <Icon name="download" />
            Template of the table (CSV)
          </a>
        </p>
      </section>
      {open.length > 0 && (
        <section aria-labelledby="open-batches" className="grid gap-2">
          <h3 id="open-batches">Batches that wait</h3>
          <ul className="grid gap-2">
            {open.map((run) => (
              <li key={run.publicId} className="panel flex flex-wrap items-baseline justify-between gap-2">
                <Link to={`${base}/batch/${run.publicId}`}>
                  Of <DateTime at={run.createdAt} />
                  {run.by && `, by ${run.by}`}
                </Link>
                {run.expiresAt && (
                  <span className="text-small soft">
                    kept until <DateTime at={run.expiresAt} dateOnly />
                  </span>
                )}
              </li>
            ))}
          </ul>
        </section>
      )}
    </section>
  );
}

const NOTHING_CHOSEN = "No file was chosen. Nothing was stored; choose a folder, some files or a ZIP.";
