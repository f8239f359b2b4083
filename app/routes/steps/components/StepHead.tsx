import { Form, Link } from "react-router";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Dialog } from "~/components/ui/Dialog";
import { InputField } from "~/components/ui/Field";
import { Tag } from "~/components/ui/Tag";
import { AntennaCautions } from "~/routes/antenna/components/AntennaCautions";
import type { StepPageData } from "../step-page.server";

/** What was changed, when, by whom, and what can be done with the step. */
export function StepHead({ data, errors }: { data: StepPageData; errors: string[] }) {
  const { step, project, mayEdit, sharedWith, dismissed } = data;
  const base = `/projects/${project.publicId}`;
  const planned = step.state === "planned";
  return (
    <header className="grid gap-3">
      <Breadcrumbs items={[{ label: "Steps", to: `${base}/steps` }]} />
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <h2 className="sweep-title">{step.title}</h2>
        {mayEdit && (
          <div className="flex flex-wrap gap-2 no-print">
            <LinkButton to="edit" icon="edit" size="small" variant="quiet">
              Change
            </LinkButton>
            <DeleteDialog data={data} />
          </div>
        )}
      </div>
      <p className="provenance flex flex-wrap gap-x-2 items-center">
        {planned && <Tag tone="heather">planned</Tag>}
        {step.at ? <DateTime at={step.at} /> : "no day yet"} · {step.by ?? "former member"}
      </p>
      {step.quantities.length > 0 && (
        <ul className="number grid gap-1">
          {step.quantities.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      )}
      {step.editsAntenna && !planned && (
        <p className="text-small">
          The <Link to={`${base}/antenna?on=${minuteOf(step.at)}`}>antenna as it was then</Link> has it.
        </p>
      )}
      {data.beforeAntenna && (
        <p className="text-small text-clay">
          The antenna is not described for that day: its description begins later.
        </p>
      )}
      {sharedWith.length > 0 && (
        <p className="text-clay max-w-[72ch]">
          Between the same sweeps lies also{" "}
          {sharedWith.map((other, i) => (
            <span key={other.publicId}>
              {i > 0 && ", "}
              <Link to={`${base}/steps/${other.publicId}`}>{other.title}</Link>
            </span>
          ))}
          . What each of them did can't be told apart; a sweep between them would.
        </p>
      )}
      {errors.map((error) => (
        <p key={error} role="alert" className="text-alarm">
          {error}
        </p>
      ))}
      {planned && mayEdit && <AntennaCautions dismissed={dismissed} />}
      {planned && mayEdit && <DoneForm at={step.at} />}
    </header>
  );
}

function DoneForm({ at }: { at: Date | null }) {
  return (
    <Form method="post" className="panel flex flex-wrap items-end gap-4 no-print justify-self-start">
      <InputField
        label="Done at"
        hint="In UTC."
        name="at"
        type="datetime-local"
        defaultValue={minuteOf(at ?? new Date())}
        required
      />
      <Button name="intent" value="done" icon="check">
        Mark it done
      </Button>
    </Form>
  );
}

function DeleteDialog({ data }: { data: StepPageData }) {
  const { step, photographs } = data;
  return (
    <Dialog label="Delete" variant="danger" size="small" icon="remove" title="Delete this step?">
      <p>
        “{step.title}” goes for good
        {photographs.length > 0 &&
          `, with ${photographs.length === 1 ? "its photograph" : `its ${photographs.length} photographs`}`}
        .{" "}
        {step.editsAntenna &&
          step.state === "done" &&
          "What it changed of the antenna is taken back, unless that was changed again since. "}
        Sweeps stay.
      </p>
      <Form method="post">
        <Button variant="danger" name="intent" value="delete">
          Delete the step
        </Button>
      </Form>
    </Dialog>
  );
}

function minuteOf(at: Date | string | null): string {
  return at ? new Date(at).toISOString().slice(0, 16) : "";
}
