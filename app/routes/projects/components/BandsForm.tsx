import { getFormProps, type SubmissionResult, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { useState } from "react";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { bandsSchema } from "../project.schema.ts";

type BandRow = Partial<Record<"name" | "lowMhz" | "highMhz" | "swrLimit", string>>;

export interface BandsFormProps {
  bands: BandRow[];
  lastResult?: SubmissionResult<string[]>;
}

const EMPTY_ROWS = 2;
const COLUMNS = [
  { key: "name", label: "Name", numeric: false },
  { key: "lowMhz", label: "From, MHz", numeric: true },
  { key: "highMhz", label: "To, MHz", numeric: true },
  { key: "swrLimit", label: "SWR limit", numeric: true },
] as const;

/** One row a band. A row that is emptied goes; the empty ones at the end are for new bands. */
export function BandsForm({ bands, lastResult }: BandsFormProps) {
  const busy = useNavigation().formData?.get("intent") === "bands";
  const [more, setMore] = useState(0);
  const [form] = useForm({
    id: "bands",
    lastResult,
    onValidate: ({ formData }) => parseWithZod(formData, { schema: bandsSchema }),
  });
  const sent = lastResult?.initialValue?.bands as (BandRow | undefined)[] | undefined;
  const known: BandRow[] = sent ? Array.from(sent, (row) => row ?? {}) : bands;
  const rows = [...known, ...Array.from({ length: EMPTY_ROWS + more }, () => ({}) as BandRow)];
  return (
    <section className="space-y-3">
      <h2>Design bands</h2>
      <p className="soft max-w-[72ch]">
        Where the antenna is meant to work. They are drawn behind every sweep, and a dip outside all of them
        is marked. Empty a row to remove it.
      </p>
      <Form method="post" {...getFormProps(form)} className="space-y-4">
        <div className="grid gap-3">
          {rows.map((row, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a row is its place in the form
            <BandRowFields key={i} index={i} row={row} errors={form.allErrors} />
          ))}
        </div>
        <div className="flex flex-wrap gap-3">
          <Button name="intent" value="bands" busy={busy}>
            Keep these bands
          </Button>
          <Button type="button" variant="quiet" icon="add" onClick={() => setMore(more + 1)}>
            Another row
          </Button>
        </div>
      </Form>
    </section>
  );
}

interface RowProps {
  index: number;
  row: BandRow;
  errors: Record<string, string[] | null>;
}

function BandRowFields({ index, row, errors }: RowProps) {
  const prefix = `bands[${index}]`;
  const faults = COLUMNS.flatMap((column) => errors[`${prefix}.${column.key}`] ?? []);
  return (
    <fieldset className="border-b border-rule pb-3">
      <legend className="sr-only">Band {index + 1}</legend>
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-[2fr_1fr_1fr_1fr]">
        {COLUMNS.map((column) => {
          const name = `${prefix}.${column.key}`;
          return (
            <label key={column.key} className="grid gap-1 text-small">
              <span className="soft">{column.label}</span>
              <input
                name={name}
                defaultValue={row[column.key] ?? (column.key === "swrLimit" ? "2" : "")}
                inputMode={column.numeric ? "decimal" : undefined}
                autoComplete="off"
                className={`control ${column.numeric ? "number" : ""}`}
                aria-invalid={errors[name] ? true : undefined}
                aria-describedby={faults.length > 0 ? `band-${index}-faults` : undefined}
              />
            </label>
          );
        })}
      </div>
      {faults.length > 0 && (
        <p id={`band-${index}-faults`} className="field-error mt-1">
          {faults.join(" ")}
        </p>
      )}
    </fieldset>
  );
}
