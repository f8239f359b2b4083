import { useState } from "react";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { type FigureField, GIVEN_FIELDS, PART_KINDS, STANDARD_FIELDS } from "../benches.schema";
import type { VersionForm } from "../version-form";

export type FieldErrors = Record<string, string[] | null | undefined>;

export interface VersionFieldsProps {
  values: VersionForm;
  errors: FieldErrors;
  /** The last day that can be given: today. */
  today: string;
  remark: { label: string; hint: string };
  since: string;
}

/** What is said of a bench as it is from a day on; the same when it is made, rebuilt and corrected. */
export function VersionFields({ values, errors, today, remark, since }: VersionFieldsProps) {
  return (
    <>
      <InputField
        label="As it is from"
        hint={since}
        type="date"
        name="validFrom"
        max={today}
        required
        defaultValue={values.validFrom}
        errors={errors.validFrom ?? undefined}
      />
      <InputField
        {...remark}
        name="remark"
        maxLength={300}
        defaultValue={values.remark}
        errors={errors.remark ?? undefined}
        autoComplete="off"
      />
      <Parts parts={values.parts} />
      <Figures
        name="standards"
        summary="What the standards are"
        hint="Empty: ideal. Capacitance, inductance and delay count for sweeps with phase only; the load’s return loss tells how much of what it leaves is its own."
        fields={STANDARD_FIELDS}
        values={values.standards}
        errors={errors}
      />
      <Figures
        name="given"
        summary="What is known without a sweep"
        hint="From a data sheet or another measurement. A sweep of the standard is better than any of these."
        fields={GIVEN_FIELDS}
        values={values.given}
        errors={errors}
      />
    </>
  );
}

function Parts({ parts }: { parts: VersionForm["parts"] }) {
  const [more, setMore] = useState(0);
  const rows = [...parts, ...Array.from({ length: EMPTY_ROWS + more }, () => ({ kind: "", text: "" }))];
  return (
    <fieldset className="grid gap-2">
      <legend className="font-semibold mb-1">Connectors and cables</legend>
      {rows.map((row, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: a row is its place in the form
        <div key={i} className="grid grid-cols-[8.5rem_minmax(0,1fr)] gap-2">
          <select
            name={`parts[${i}].kind`}
            aria-label={`Part ${i + 1}: kind`}
            defaultValue={row.kind || (i === parts.length + 1 ? "cable" : "connector")}
            className="control"
          >
            {PART_KINDS.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </select>
          <input
            name={`parts[${i}].text`}
            aria-label={`Part ${i + 1}: what it is`}
            defaultValue={row.text}
            maxLength={200}
            autoComplete="off"
            className="control"
          />
        </div>
      ))}
      <p className="field-hint">Where torque, length or make could matter later. Empty a row to remove it.</p>
      <div>
        <Button type="button" variant="quiet" size="small" icon="add" onClick={() => setMore(more + 1)}>
          Another row
        </Button>
      </div>
    </fieldset>
  );
}

interface FiguresProps {
  name: string;
  summary: string;
  hint: string;
  fields: readonly FigureField<string>[];
  values: Partial<Record<string, string>>;
  errors: FieldErrors;
}

function Figures({ name, summary, hint, fields, values, errors }: FiguresProps) {
  const open = fields.some(({ key }) => values[key] || errors[`${name}.${key}`]);
  return (
    <details open={open} className="bench-figures">
      <summary className="font-semibold">{summary}</summary>
      <p className="field-hint my-2">{hint}</p>
      <div className="grid gap-4 sm:grid-cols-2">
        {fields.map(({ key, label, unit }) => (
          <InputField
            key={key}
            label={label}
            name={`${name}.${key}`}
            inputMode="decimal"
            autoComplete="off"
            unit={unit}
            defaultValue={values[key]}
            errors={errors[`${name}.${key}`] ?? undefined}
          />
        ))}
      </div>
    </details>
  );
}

const EMPTY_ROWS = 2;
