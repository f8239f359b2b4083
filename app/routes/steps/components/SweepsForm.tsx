import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { SelectField } from "~/components/ui/Field";
import { formatDate } from "~/services/dates";
import type { StepPageData } from "../step-page.server";

/** Which sweeps stand beside the step: found by date, confirmed or changed by hand. */
export function SweepsForm({ data }: { data: StepPageData }) {
  const { effect, choices, mayEdit, step } = data;
  if (step.state === "planned" && choices.length === 0) return null;
  return (
    <section aria-labelledby="beside" className="grid gap-3">
      <h3 id="beside">Sweeps beside it</h3>
      <p className="text-small">
        <Side data={data} side="before" said={effect.beforeSaid} />.{" "}
        <Side data={data} side="after" said={effect.afterSaid} />.
      </p>
      {mayEdit && choices.length > 0 && (
        <details className="no-print">
          <summary className="button button-quiet button-small">Confirm or change them</summary>
          <Form method="post" className="panel grid gap-4 justify-items-start mt-3 max-w-[36rem]">
            <SelectField
              label="Before"
              name="before"
              defaultValue={effect.before?.publicId ?? ""}
              options={optionsFor(choices)}
            />
            <SelectField
              label="After"
              name="after"
              defaultValue={effect.after?.publicId ?? ""}
              options={optionsFor(choices)}
            />
            <Button name="intent" value="sweeps">
              Keep these sweeps
            </Button>
          </Form>
        </details>
      )}
    </section>
  );
}

function Side({ data, side, said }: { data: StepPageData; side: "before" | "after"; said: boolean }) {
  const sweep = data.effect[side];
  if (!sweep) return <>{side === "before" ? "Before: none" : "After: none yet"}</>;
  return (
    <>
      {side === "before" ? "Before: " : "After: "}
      <Link to={`/projects/${data.project.publicId}/sweeps/${sweep.publicId}`}>{sweep.title}</Link>
      {`, ${sweep.plane}, `}
      {said ? "said by a person" : "found by date"}
    </>
  );
}

function optionsFor(choices: StepPageData["choices"]) {
  return [
    { value: "", label: "as the dates say" },
    ...choices.map(({ publicId, title, takenAt }) => ({
      value: publicId,
      label: takenAt ? `${title}, ${formatDate(new Date(takenAt))}` : title,
    })),
  ];
}
