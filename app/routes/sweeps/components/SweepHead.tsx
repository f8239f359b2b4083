import { Form, Link } from "react-router";
import { type Conflict, EditConflict } from "~/components/edit-conflict/EditConflict";
import { MakePlate } from "~/components/plates/MakePlate";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { InputField } from "~/components/ui/Field";
import { formatFrequency } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";
import { kindOf } from "../words";

/** Title, where the numbers come from, and what can be done with the sweep. */
export function SweepHead({
  data,
  errors,
  conflict,
}: {
  data: SweepPageData;
  errors: string[];
  conflict?: Conflict;
}) {
  const { project, sweep, may } = data;
  const base = `/projects/${project.publicId}`;
  return (
    <header className="grid gap-2">
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <h2 className="sweep-title">{sweep.title}</h2>
        <div className="flex flex-wrap gap-2 no-print">
          <MakePlate from={`sweep:${sweep.publicId}`} view={data.view} />
          {may.edit && (
            <EditDialog key={`${sweep.title} ${sweep.takenAt}`} sweep={sweep} conflict={conflict} />
          )}
          {may.delete && (
            <DeleteDialog
              title={sweep.title}
              noteCount={data.dips.reduce((n, dip) => n + dip.noteCount, 0)}
            />
          )}
        </div>
      </div>
      <p className="provenance">
        {sweep.takenAt ? <DateTime at={sweep.takenAt} /> : "date not said"}
        {sweep.pointCount !== null && ` · ${sweep.pointCount.toLocaleString("en")} points`}
        {sweep.startHz !== null &&
          sweep.stopHz !== null &&
          ` · ${formatFrequency(sweep.startHz, null)} – ${formatFrequency(sweep.stopHz, null)}`}
        {` · ${kindOf(sweep.format)}`}
        {sweep.referenceOhm !== null && ` · ${sweep.referenceOhm} Ω`}
        {` · ${data.correction.short}`}
      </p>
      {data.referenceOf.map(({ bench, version, kind }) => (
        <p key={`${version.publicId} ${kind}`}>
          The {kind} of the bench{" "}
          <Link to={`${base}/benches/${bench.publicId}?version=${version.publicId}`}>{bench.name}</Link>,
          version {version.number}.
        </p>
      ))}
      <p className="text-small">
        <Link to={`${base}/sweeps/${sweep.publicId}/reading`}>
          {sweep.format === "screenshot" && "Read from a picture. "}
          {readingWords(sweep)}
        </Link>
        {" · "}
        <Link to={`${base}/compare?sweep=${sweep.publicId}`} className="no-print">
          Compare with others
        </Link>
        {(sweep.repeatGroup || may.edit) && (
          <>
            {" · "}
            <Link to={`${base}/sweeps/${sweep.publicId}/repeats`}>
              {sweep.repeatGroup ? "One of several repeats: see their spread" : "Repeats"}
            </Link>
          </>
        )}
      </p>
      {errors.map((error) => (
        <p key={error} role="alert" className="text-alarm">
          {error}
        </p>
      ))}
    </header>
  );
}

function readingWords(sweep: SweepPageData["sweep"]): string {
  if (sweep.questions > 0)
    return `Read with ${sweep.questions === 1 ? "one question" : `${sweep.questions} questions`} open: look at the reading`;
  if (sweep.assumed.length > 0)
    return `Read with ${sweep.assumed.length === 1 ? "one assumption" : `${sweep.assumed.length} assumptions`}`;
  return "Read without questions";
}

function EditDialog({ sweep, conflict }: { sweep: SweepPageData["sweep"]; conflict?: Conflict }) {
  const taken = sweep.takenAt ? new Date(sweep.takenAt).toISOString().slice(0, 16) : "";
  if (conflict) {
    return (
      <Dialog label="Title and date" icon="edit" size="small" title="Title and date">
        <EditConflict
          key={conflict.was}
          intent="edit"
          conflict={conflict}
          labels={{ title: "Title", takenAt: "Taken at, UTC" }}
          words={{ takenAt: (at) => at.replace("T", " ") || "not said" }}
        />
      </Dialog>
    );
  }
  return (
    <Dialog label="Title and date" icon="edit" size="small" title="Title and date">
      <Form method="post" className="grid gap-4">
        <input type="hidden" name="intent" value="edit" />
        <input
          type="hidden"
          name="was"
          value={JSON.stringify({ title: sweep.title, takenAt: taken || null })}
        />
        <InputField label="Title" name="title" defaultValue={sweep.title} required maxLength={160} />
        <InputField
          label="Taken at"
          hint="In UTC. Leave it empty where it is not known."
          name="takenAt"
          type="datetime-local"
          defaultValue={taken}
        />
        <div>
          <Button>Keep</Button>
        </div>
      </Form>
    </Dialog>
  );
}

function DeleteDialog({ title, noteCount }: { title: string; noteCount: number }) {
  const notes =
    noteCount === 0
      ? "its dips"
      : `its dips and ${noteCount === 1 ? "one note" : `${noteCount} notes`} on them`;
  return (
    <Dialog label="Delete" variant="danger" size="small" icon="remove" title="Delete this sweep?">
      <p>
        “{title}” goes for good, with its original file, {notes}. Download the original first if nobody else
        has it.
      </p>
      <Form method="post">
        <input type="hidden" name="intent" value="delete" />
        <Button variant="danger">Delete the sweep</Button>
      </Form>
    </Dialog>
  );
}
