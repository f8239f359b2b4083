import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { CheckboxField, FieldGroup } from "~/components/ui/Field";
import { LENGTH_UNITS } from "../account.schema.ts";

/** How lengths are shown; they may be written either way. */
export function LengthsForm({ lengthUnit }: { lengthUnit: "m" | "ft" }) {
  const busy = useNavigation().formData?.get("intent") === "lengths";
  return (
    <section className="space-y-3">
      <h2>Lengths</h2>
      <Form method="post" className="space-y-3">
        <FieldGroup legend="Shown in">
          {LENGTH_UNITS.map(({ value, label }) => (
            <CheckboxField
              key={value}
              type="radio"
              name="lengthUnit"
              value={value}
              label={label}
              defaultChecked={lengthUnit === value}
            />
          ))}
        </FieldGroup>
        <p className="soft text-small">You may write either anywhere: 10.14 m, 33 ft 3 1/4 in.</p>
        <Button name="intent" value="lengths" busy={busy}>
          Keep this
        </Button>
      </Form>
    </section>
  );
}
