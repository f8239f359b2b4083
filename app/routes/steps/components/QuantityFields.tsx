import "../steps.css";
import { useState } from "react";
import { InputField, SelectField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import type { QuantityTexts, TargetOption } from "../step-form";

export interface QuantityFieldsProps {
  index: number;
  row: QuantityTexts;
  targets: TargetOption[];
  errors: Record<string, string[] | null>;
}

/** One measured quantity: of the antenna, where its own name and unit are known, or of anything else. */
export function QuantityFields({ index, row, targets, errors }: QuantityFieldsProps) {
  const [target, setTarget] = useState(row.target ?? "");
  const hydrated = useHydrated();
  const prefix = `quantities[${index}]`;
  const field = (name: keyof QuantityTexts) => ({
    name: `${prefix}.${name}`,
    defaultValue: row[name] ?? "",
    errors: errors[`${prefix}.${name}`] ?? undefined,
    autoComplete: "off",
  });
  const free = target === "" || !hydrated;
  return (
    <fieldset className="panel quantity-fields">
      <legend className="sr-only">Quantity {index + 1}</legend>
      {targets.length > 0 && (
        <SelectField
          label="Of the antenna"
          className="quantity-target"
          {...field("target")}
          onChange={(event) => setTarget(event.currentTarget.value)}
          options={[{ value: "", label: "something else" }, ...targets]}
        />
      )}
      {free && (
        <InputField
          label={targets.length > 0 && !hydrated ? "Or named" : "Named"}
          {...field("label")}
          maxLength={80}
        />
      )}
      <InputField
        label="From"
        placeholder={free ? undefined : "as the antenna says"}
        {...field("from")}
        maxLength={40}
      />
      <InputField label="To" {...field("to")} maxLength={40} />
      {free && <InputField label="Unit" {...field("unit")} maxLength={20} />}
    </fieldset>
  );
}
