import { CheckboxField, FieldGroup, InputField, SelectField, TextareaField } from "~/components/ui/Field";
import { LICENCES } from "~/services/plates/licences";
import type { PlateErrors, PlateTexts } from "../plates.schema";
import type { Labelled } from "../preview-plate.server";

export interface PlateFieldsProps {
  texts: PlateTexts;
  errors: PlateErrors;
  /** What can be called something else on the plate. */
  labelled: Labelled[];
  /** Whether there are curves with dips, and a choice between return loss and SWR: not for a bench. */
  curves: boolean;
}

/** What is said on a plate and what is shown: the same when it is made and when it is mended. */
export function PlateFields({ texts, errors, labelled, curves }: PlateFieldsProps) {
  return (
    <>
      <InputField
        label="Title"
        name="title"
        defaultValue={texts.title}
        errors={errors.title}
        maxLength={160}
        required
        autoComplete="off"
      />
      <TextareaField
        label="Caption"
        hint="Markdown: what is seen, and how it was measured. May stay empty."
        name="caption"
        rows={4}
        maxLength={2000}
        defaultValue={texts.caption}
        errors={errors.caption}
      />
      <div className="plate-stretch">
        <InputField
          label="From"
          name="low"
          inputMode="decimal"
          unit="MHz"
          defaultValue={texts.low}
          errors={errors.low}
          autoComplete="off"
        />
        <InputField
          label="To"
          name="high"
          inputMode="decimal"
          unit="MHz"
          defaultValue={texts.high}
          errors={errors.high}
          autoComplete="off"
        />
        <p className="field-hint">Empty: all there is.</p>
      </div>
      <div className="flex flex-wrap gap-x-6 gap-y-4">
        <SelectField
          label="Frequency axis"
          name="scale"
          defaultValue={texts.scale}
          errors={errors.scale}
          options={[
            { value: "linear", label: "Linear" },
            { value: "log", label: "Logarithmic" },
          ]}
        />
        {curves ? (
          <SelectField
            label="Curve"
            name="quantity"
            defaultValue={texts.quantity}
            errors={errors.quantity}
            options={[
              { value: "return-loss", label: "Return loss" },
              { value: "swr", label: "SWR" },
            ]}
          />
        ) : (
          <input type="hidden" name="quantity" value={texts.quantity} />
        )}
      </div>
      <FieldGroup legend="Shown in the figure">
        {curves ? (
          <CheckboxField name="showDips" label="Dips with their numbers" defaultChecked={texts.showDips} />
        ) : (
          <Kept name="showDips" ticked={texts.showDips} />
        )}
        <CheckboxField name="showBands" label="Bands" defaultChecked={texts.showBands} />
        {curves ? (
          <CheckboxField
            name="showLimits"
            label="Limits of the numbers"
            hint="They stand in the table in any case."
            defaultChecked={texts.showLimits}
          />
        ) : (
          <Kept name="showLimits" ticked={texts.showLimits} />
        )}
        <CheckboxField name="showTitle" label="Number and title" defaultChecked={texts.showTitle} />
      </FieldGroup>
      {labelled.length > 0 && (
        <details>
          <summary>Labels</summary>
          <div className="grid gap-3 pt-3">
            {labelled.map(({ id, is }) => (
              <InputField
                key={id}
                label={is}
                name={`label.${id}`}
                defaultValue={texts.labels[id] ?? ""}
                placeholder={is}
                maxLength={80}
                autoComplete="off"
              />
            ))}
          </div>
        </details>
      )}
      <SelectField
        label="Licence"
        hint="What others may do with the figure and its numbers."
        name="licence"
        defaultValue={texts.licence}
        errors={errors.licence}
        options={LICENCES.map(({ id, name }) => ({ value: id, label: name }))}
      />
    </>
  );
}

/** A choice that this plate does not have, sent along as it is. */
function Kept({ name, ticked }: { name: string; ticked: boolean }) {
  return ticked && <input type="hidden" name={name} value="on" />;
}
