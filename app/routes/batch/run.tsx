import { useEffect } from "react";
import { data, Link, redirect, useRevalidator } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { readUploadForm } from "~/routes/sweeps/take-uploads.server";
import { beginTaking, giveUp, leaveOutProblems, mendRows } from "~/services/batch/mend.server";
import { startOnBatch } from "~/services/batch/work.server";
import { redirectWithMessage } from "~/services/flash.server";
import type { Route } from "./+types/run";
import { intentSchema, parseChanges } from "./batch.schema";
import { receiveMore, requireBatch } from "./batch-form.server";
import { Arrived } from "./components/Arrived";
import { MoreFiles } from "./components/MoreFiles";
import { Results } from "./components/Results";
import { RowsTable } from "./components/RowsTable";
import { RowsToMend } from "./components/RowsToMend";
import { showBatch } from "./run-page.server";

export const meta: Route.MetaFunction = () => [{ title: "Batch of sweeps · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "sweep.add");
  const run = await requireBatch(access, args.params.batch);
  const edit = new URL(args.request.url).searchParams.get("edit");
  return {
    project: { publicId: access.project.publicId },
    batch: await showBatch(run, access.project.id),
    edit: edit && /^\d{1,4}$/.test(edit) ? Number(edit) : null,
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const run = await requireBatch(access, args.params.batch);
  const { project } = access;
  const form = await readUploadForm(args.request);
  const parsed = intentSchema.safeParse(form.get("intent"));
  if (!parsed.success) return data({ error: NOT_UNDERSTOOD }, 400);
  const intent = parsed.data;
  const here = `/projects/${project.publicId}/sweeps/batch/${run.publicId}`;
  switch (intent) {
    case "mend": {
      const changes = parseChanges(form);
      if (!changes) return data({ error: NOT_UNDERSTOOD }, 400);
      await mendRows(run.publicId, changes);
      await startOnBatch(run.publicId);
      return redirect(here);
    }
    case "leave-out":
      await leaveOutProblems(run.publicId, project.id);
      return redirect(here);
    case "take":
      if (!(await beginTaking(run.publicId, project.id))) return data({ error: NOT_YET }, 400);
      await startOnBatch(run.publicId);
      return redirect(here);
    case "add":
      if (!(await receiveMore(run, form))) return data({ error: NOTHING_CHOSEN }, 400);
      return redirect(here);
    case "give-up":
      if (!(await giveUp(run.publicId))) return data({ error: BEING_TAKEN }, 400);
      return redirectWithMessage(
        `/projects/${project.publicId}/sweeps/batch`,
        "The batch is put away; its files were removed.",
      );
    default:
      return intent satisfies never;
  }
}

export default function Batch({ loaderData, actionData }: Route.ComponentProps) {
  const { project, batch, edit } = loaderData;
  const base = `/projects/${project.publicId}`;
  const busy = BUSY.includes(batch.phase);
  useLook(busy);
  return (
    <section className="grid grid-cols-1 gap-6" aria-labelledby="batch">
      <div className="grid grid-cols-1 gap-2">
        <Breadcrumbs
          items={[
            { label: "Sweeps", to: `${base}/sweeps` },
            { label: "Many at once", to: `${base}/sweeps/batch` },
          ]}
        />
        <h2 id="batch" className="sweep-title">
          {HEADINGS[batch.phase]}
        </h2>
      </div>
      {actionData?.error && (
        <p role="alert" className="text-alarm">
          {actionData.error}
        </p>
      )}
      {busy && <Progress phase={batch.phase} done={batch.done} all={batch.all} />}
      <Arrived batch={batch} />
      {batch.phase === "checked" && <RowsToMend batch={batch} edit={edit} base={base} />}
      {batch.phase === "done" || batch.phase === "taking" ? (
        <Results batch={batch} base={base} />
      ) : (
        <RowsTable batch={batch} base={base} />
      )}
      {batch.phase === "checked" && <MoreFiles base={base} batch={batch.publicId} />}
    </section>
  );
}

function Progress({ phase, done, all }: { phase: string; done: number; all: number }) {
  return (
    <div className="grid gap-2 max-w-[36rem]" role="status">
      <progress className="progress" max={Math.max(all, 1)} value={done} aria-label="Progress of the batch" />
      <p className="text-small soft">
        {done} of {all} {phase === "taking" ? "taken in" : "looked at"}. You can leave this page; it goes on.{" "}
        <Link to="." reloadDocument>
          Look again
        </Link>
      </p>
    </div>
  );
}

/** While work goes on the page asks how far it is. */
function useLook(busy: boolean) {
  const { revalidate, state } = useRevalidator();
  useEffect(() => {
    if (!busy || state !== "idle") return;
    const timer = setTimeout(revalidate, LOOK_EVERY_MS);
    return () => clearTimeout(timer);
  }, [busy, state, revalidate]);
}

const BUSY = ["checking", "taking"];
const LOOK_EVERY_MS = 1000;
const HEADINGS = {
  receiving: "Batch, not all of it sent yet",
  checking: "Batch being checked",
  checked: "Batch, checked",
  taking: "Batch being taken in",
  done: "Batch, taken in",
} as const;
const NOT_UNDERSTOOD = "That form was not understood. Nothing was changed; load the page anew.";
const NOT_YET =
  "Some rows are still to be mended or left out, or none is left. Nothing was taken in; look at the list below.";
const NOTHING_CHOSEN = "No file was chosen. Nothing was changed; choose one and send again.";
const BEING_TAKEN = "It is being taken in just now. Nothing was removed; wait until it is done.";
