import { Form } from "react-router";
import { InputField, SelectField } from "~/components/ui/Field";

export interface NumbersFormProps {
  /** What the address holds, as it was typed. */
  typed: Record<string, string | undefined>;
  errors: Record<string, string[] | undefined>;
}

/** The same question as in the box, field by field. */
export function NumbersForm({ typed, errors }: NumbersFormProps) {
  const field = (name: string) => ({
    name,
    id: `numbers-${name}`,
    inputMode: "decimal" as const,
    defaultValue: typed[name] ?? "",
    errors: errors[name],
    autoComplete: "off",
  });
  return (
    <Form action="/search" className="panel grid gap-4 content-start" aria-labelledby="numbers">
      <h2 id="numbers">Dips by their numbers</h2>
      <div className="grid grid-cols-2 gap-3">
        <InputField label="From" unit="MHz" {...field("from")} />
        <InputField label="To" unit="MHz" {...field("to")} />
        <InputField label="SWR under" {...field("under")} />
        <InputField label="SWR over" {...field("over")} />
      </div>
      <SelectField
        label="Verdict"
        name="verdict"
        id="numbers-verdict"
        defaultValue={typed.verdict ?? ""}
        options={[
          { value: "", label: "Any" },
          { value: "open", label: "Open" },
          { value: "proposed", label: "Proposed" },
          { value: "settled", label: "Settled" },
        ]}
      />
      <InputField
        label="Words"
        hint="In the verdict or the sweep's title."
        name="q"
        id="numbers-q"
        defaultValue={typed.q ?? ""}
        maxLength={200}
      />
      <div>
        <button type="submit" className="button button-quiet">
          Find dips
        </button>
      </div>
    </Form>
  );
}
