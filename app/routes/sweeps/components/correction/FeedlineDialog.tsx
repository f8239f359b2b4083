import { Form, Link } from "react-router";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { InputField, SelectField } from "~/components/ui/Field";
import type { CorrectionData } from "../../correction-page.server";
import { feedlineFields } from "../../feedline.schema";
import type { SweepPageData } from "../../sweep-page.server";

interface FeedlineDialogProps {
  data: SweepPageData;
  choices: NonNullable<CorrectionData["choices"]>;
  errors: Record<string, string[]> | undefined;
}

/** The line between port and antenna: a cable of the table, one of the project's own, or its figures. */
export function FeedlineDialog({ data, choices, errors }: FeedlineDialogProps) {
  const { correction, project } = data;
  const was = feedlineFields(correction.feedline, choices.own);
  const { proposal } = correction;
  const begin = correction.feedline ? was : (proposal ?? was);
  return (
    <Dialog
      label={correction.feedline ? "Another feedline" : "Say the feedline"}
      size="small"
      title="The feedline"
    >
      {proposal && !correction.feedline && (
        <p className="text-small">Filled in with the feedline of the antenna as it was that day.</p>
      )}
      <Form method="post" className="grid gap-4">
        <input type="hidden" name="intent" value="feedline" />
        <SelectField
          label="Cable"
          name="cable"
          defaultValue={begin.cable}
          errors={errors?.cable}
          options={[
            ...(begin.cable === "" ? [{ value: "", label: "Choose a cable" }] : []),
            ...choices.own.map(({ publicId, name }) => ({
              value: `own:${publicId}`,
              label: `${name} (this project's)`,
            })),
            ...choices.cables.map(({ name }) => ({ value: name, label: name })),
            { value: "values", label: "The figures below" },
          ]}
        />
        <InputField
          label="Length"
          name="lengthM"
          inputMode="decimal"
          unit="m"
          required
          defaultValue={begin.lengthM}
          errors={errors?.lengthM}
          className="w-36"
        />
        <InputField
          label="Velocity factor"
          name="velocityFactor"
          inputMode="decimal"
          hint="Empty: as the cable's sheet says."
          defaultValue={begin.velocityFactor}
          errors={errors?.velocityFactor}
          className="w-60"
        />
        <fieldset className="field-group">
          <legend>Figures, where no cable of the list is it</legend>
          <div className="flex flex-wrap gap-4">
            <InputField
              label="k1"
              name="k1"
              inputMode="decimal"
              unit="dB/m per √MHz"
              defaultValue={begin.k1}
              errors={errors?.k1}
              className="w-60"
            />
            <InputField
              label="k2"
              name="k2"
              inputMode="decimal"
              unit="dB/m per MHz"
              defaultValue={begin.k2}
              errors={errors?.k2}
              className="w-60"
            />
          </div>
          <p className="field-hint">
            Matched loss of a metre is k1·√f + k2·f.{" "}
            <Link to={`/projects/${project.publicId}/cables`}>Add a cable by points of its sheet</Link>
          </p>
        </fieldset>
        <div>
          <Button>Take it away</Button>
        </div>
      </Form>
      {correction.feedline && (
        <Form method="post">
          <input type="hidden" name="intent" value="no-feedline" />
          <Button variant="quiet" size="small">
            No feedline is known
          </Button>
        </Form>
      )}
    </Dialog>
  );
}
