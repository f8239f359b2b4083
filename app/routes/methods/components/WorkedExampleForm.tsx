import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField, SelectField } from "~/components/ui/Field";
import type { ShownDefinition } from "../shown-definition.server";

/** A definition's example: a plain form whose values stand in the address, and what the code makes of them. */
export function WorkedExampleForm({ definition: { id, title, worked } }: { definition: ShownDefinition }) {
  return (
    <Form
      action={`/methods#${id}`}
      preventScrollReset
      replace
      aria-label={`Example: ${title}`}
      className="panel example"
    >
      <div className="example-fields">
        {worked.fields.map(({ name, label, unit, text, error, choices }) =>
          choices ? (
            <SelectField
              key={`${name} ${text}`}
              label={label}
              name={name}
              defaultValue={text}
              errors={error ? [error] : undefined}
              options={choices.map((word) => ({ value: word, label: word }))}
            />
          ) : (
            <InputField
              key={`${name} ${text}`}
              label={label}
              name={name}
              defaultValue={text}
              unit={unit}
              inputMode="decimal"
              autoComplete="off"
              errors={error ? [error] : undefined}
            />
          ),
        )}
        <Button variant="quiet" size="small">
          Reckon
        </Button>
      </div>
      {worked.rows ? (
        <dl className="example-rows">
          {worked.rows.map(({ label, value }, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: rows come in order, some with the same label
            <div key={i}>
              <dt>{label}</dt>
              <dd className="number">{value}</dd>
            </div>
          ))}
        </dl>
      ) : (
        <p className="soft">Nothing was reckoned: put the marked field right.</p>
      )}
    </Form>
  );
}
