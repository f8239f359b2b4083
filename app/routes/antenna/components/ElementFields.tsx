import { InputField, SelectField } from "~/components/ui/Field";
import { ELEMENT_KINDS } from "~/measurement/antenna";
import { KIND_WORDS } from "~/services/antenna-words";
import type { ElementTexts, FieldErrors } from "../antenna-form";

export interface ElementFieldsProps {
  index: number;
  row: ElementTexts;
  errors: FieldErrors;
}

/** One conductor. The row without a kind is for a new one. */
export function ElementFields({ index, row, errors }: ElementFieldsProps) {
  const prefix = `elements[${index}]`;
  const field = (name: keyof ElementTexts) => ({
    name: `${prefix}.${name}`,
    defaultValue: row[name] ?? "",
    errors: errors[`${prefix}.${name}`] ?? undefined,
    autoComplete: "off",
  });
  const fresh = !row.key;
  return (
    <fieldset className="panel">
      <legend className="sr-only">{row.name || (fresh ? "A new element" : `Element ${index + 1}`)}</legend>
      {row.key && <input type="hidden" name={`${prefix}.key`} value={row.key} />}
      <div className="element-fields">
        <SelectField
          label="Kind"
          {...field("kind")}
          options={[
            { value: "", label: fresh ? "none" : "choose" },
            ...ELEMENT_KINDS.map((kind) => ({ value: kind, label: KIND_WORDS[kind] })),
          ]}
        />
        <InputField label="Name" {...field("name")} maxLength={60} />
        <InputField label="Length" {...field("length")} />
        <InputField label="How many" {...field("count")} inputMode="numeric" />
        <InputField label="Height of feed or middle" {...field("height")} />
        <InputField label="Diameter" unit="mm" {...field("diameter")} />
        <InputField label="Material" {...field("material")} maxLength={60} />
        <SelectField
          label="Insulated"
          {...field("insulated")}
          options={[
            { value: "", label: "not said" },
            { value: "no", label: "bare" },
            { value: "yes", label: "insulated" },
          ]}
        />
        <InputField
          label="Where it is, how it runs"
          className="element-where"
          {...field("where")}
          maxLength={400}
        />
      </div>
      {!fresh && (
        <label className="mt-3 inline-flex items-center gap-2 text-small">
          <input type="checkbox" name={`${prefix}.remove`} defaultChecked={row.remove !== undefined} />
          Taken down: remove it
        </label>
      )}
    </fieldset>
  );
}
