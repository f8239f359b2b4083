import { InputField, TextareaField } from "~/components/ui/Field";
import type { AntennaTexts, FieldErrors } from "../antenna-form";

export interface FeedFieldsProps {
  texts: AntennaTexts;
  /** Names of the cable table. */
  cables: string[];
  errors: FieldErrors;
}

/** Feedline, choke and ground. */
export function FeedFields({ texts, cables, errors }: FeedFieldsProps) {
  const { feedline, choke, ground, remarks } = texts;
  const named = (name: string, value: string | undefined) => ({
    name,
    defaultValue: value ?? "",
    errors: errors[name] ?? undefined,
    autoComplete: "off",
  });
  return (
    <section aria-labelledby="feedline" className="grid gap-4">
      <h3 id="feedline">Feedline, choke, ground</h3>
      <div className="element-fields">
        <InputField label="Cable" list="cables" {...named("feedline.cable", feedline.cable)} maxLength={80} />
        <InputField label="Its length" {...named("feedline.length", feedline.length)} />
        <InputField
          label="Velocity factor"
          inputMode="decimal"
          {...named("feedline.velocityFactor", feedline.velocityFactor)}
        />
        <InputField
          label="Route"
          className="element-where"
          {...named("feedline.route", feedline.route)}
          maxLength={400}
        />
        <InputField label="Choke, turns" inputMode="numeric" {...named("choke.turns", choke.turns)} />
        <InputField label="Its core" {...named("choke.core", choke.core)} maxLength={120} />
        <InputField
          label="Where"
          className="element-where"
          {...named("choke.where", choke.where)}
          maxLength={400}
        />
      </div>
      <datalist id="cables">
        {cables.map((name) => (
          <option key={name} value={name} />
        ))}
      </datalist>
      <div className="grid gap-4 max-w-[40rem]">
        <TextareaField label="Ground" rows={2} {...named("ground", ground)} />
        <TextareaField label="Remarks" rows={3} {...named("remarks", remarks)} />
      </div>
    </section>
  );
}
