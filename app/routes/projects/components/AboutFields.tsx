import { type FieldMetadata, getInputProps, getSelectProps, getTextareaProps } from "@conform-to/react";
import { CheckboxField, FieldGroup, InputField, SelectField, TextareaField } from "~/components/ui/Field";
import { ITU_REGIONS, VISIBILITIES } from "../project.schema.ts";

export interface AboutFieldsProps {
  fields: Record<"title" | "summary" | "visibility" | "ituRegion", FieldMetadata>;
}

/** What a project says of itself; the same when it is made and when it is changed. */
export function AboutFields({ fields }: AboutFieldsProps) {
  const chosen = fields.visibility.initialValue ?? "private";
  return (
    <>
      <InputField
        label="Title"
        errors={fields.title.errors}
        {...getInputProps(fields.title, { type: "text" })}
        autoComplete="off"
      />
      <TextareaField
        label="What it is about"
        hint="Markdown: the antenna, where it stands, the question. May stay empty."
        errors={fields.summary.errors}
        {...getTextareaProps(fields.summary)}
      />
      <FieldGroup legend="Who can read it">
        {VISIBILITIES.map((option) => (
          <CheckboxField
            key={option.value}
            type="radio"
            name={fields.visibility.name}
            value={option.value}
            id={`${fields.visibility.id}-${option.value}`}
            defaultChecked={chosen === option.value}
            label={option.label}
            hint={option.consequence}
          />
        ))}
        {fields.visibility.errors && <p className="field-error">{fields.visibility.errors[0]}</p>}
      </FieldGroup>
      <SelectField
        label="ITU region"
        hint="Whose allocations are drawn under the frequency axis. A drawing, not a permission."
        errors={fields.ituRegion.errors}
        {...getSelectProps(fields.ituRegion)}
        options={[...ITU_REGIONS]}
      />
    </>
  );
}
