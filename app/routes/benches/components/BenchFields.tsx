import { CheckboxField, InputField, TextareaField } from "~/components/ui/Field";
import type { FieldErrors } from "./VersionFields";

export interface BenchFieldsProps {
  values: { name?: string; description?: string; own?: string };
  errors: FieldErrors;
}

/** What a bench says of itself, whatever its version. */
export function BenchFields({ values, errors }: BenchFieldsProps) {
  return (
    <>
      <InputField
        label="Name"
        name="name"
        required
        maxLength={120}
        defaultValue={values.name}
        errors={errors.name ?? undefined}
        autoComplete="off"
      />
      <TextareaField
        label="Description"
        hint="Markdown: the bridge, its source and detector, how it is put together. May stay empty."
        name="description"
        rows={4}
        defaultValue={values.description}
        errors={errors.description ?? undefined}
      />
      <CheckboxField
        label="It is my own"
        hint="It can then be chosen in every project where you may add sweeps; only you change it. Who reads a sweep that was corrected with it sees its name and what it can do."
        name="own"
        value="yes"
        defaultChecked={values.own === "yes"}
      />
    </>
  );
}
