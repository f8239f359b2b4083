import { Form, Link } from "react-router";
import { InputField, SelectField } from "~/components/ui/Field";
import type { AskedTable } from "../dips-table.schema";

export interface FiltersProps extends Pick<AskedTable, "typed" | "errors" | "filtered"> {
  choices: {
    bands: { value: string; label: string }[];
    sweeps: { publicId: string; title: string }[];
  };
}

/** The filters of the table; they stand in its address. */
export function Filters({ typed, errors, filtered, choices }: FiltersProps) {
  const field = (name: "from" | "to" | "under") => ({
    name,
    id: `filter-${name}`,
    inputMode: "decimal" as const,
    defaultValue: typed[name] ?? "",
    errors: errors[name],
    autoComplete: "off",
    size: 8,
  });
  return (
    <Form
      key={JSON.stringify(typed)}
      className="grid grid-cols-[repeat(auto-fill,minmax(9rem,1fr))] items-end gap-3 no-print"
      role="search"
      aria-label="Dips of this project"
    >
      <InputField label="From" unit="MHz" {...field("from")} />
      <InputField label="To" unit="MHz" {...field("to")} />
      <InputField label="SWR under" {...field("under")} />
      <SelectField label="Band" name="band" defaultValue={typed.band ?? ""} options={choices.bands} />
      <SelectField label="Verdict" name="verdict" defaultValue={typed.verdict ?? ""} options={VERDICTS} />
      <SelectField
        label="Sweep"
        name="sweep"
        defaultValue={typed.sweep ?? ""}
        options={[
          { value: "", label: "All sweeps" },
          ...choices.sweeps.map(({ publicId, title }) => ({ value: publicId, label: title })),
        ]}
      />
      <InputField label="Words" name="q" type="search" defaultValue={typed.q ?? ""} maxLength={200} />
      {typed.sort && <input type="hidden" name="sort" value={typed.sort} />}
      <div className="flex flex-wrap items-center gap-4">
        <button type="submit" className="button button-quiet">
          Filter
        </button>
        {filtered && <Link to="?">Show all</Link>}
      </div>
    </Form>
  );
}

const VERDICTS = [
  { value: "", label: "Any" },
  { value: "open", label: "Open" },
  { value: "proposed", label: "Proposed" },
  { value: "settled", label: "Settled" },
];
