import {
  getFormProps,
  getInputProps,
  getSelectProps,
  type SubmissionResult,
  useForm,
} from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField, SelectField } from "~/components/ui/Field";
import { ITU_REGIONS } from "../../projects/project.schema.ts";
import { profileSchema } from "../account.schema.ts";

export interface ProfileFormProps {
  person: {
    name: string;
    userName: string;
    callSign: string;
    ituRegion: string;
    timeZone: string;
    email: string | null;
  };
  timeZones: string[];
  lastResult?: SubmissionResult<string[]> | null;
}

export function ProfileForm({ person, timeZones, lastResult }: ProfileFormProps) {
  const busy = useNavigation().formData?.get("intent") === "profile";
  const [form, fields] = useForm({
    id: "profile",
    lastResult,
    defaultValue: person,
    constraint: getZodConstraint(profileSchema),
    shouldValidate: "onBlur",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: profileSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>You</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="Name"
          hint="What others see beside your notes and sweeps."
          errors={fields.name.errors}
          {...getInputProps(fields.name, { type: "text" })}
          autoComplete="name"
        />
        <InputField
          label="User name"
          hint="How others find you to add you to a project. Lower-case letters, digits and hyphens."
          errors={fields.userName.errors}
          {...getInputProps(fields.userName, { type: "text" })}
          autoComplete="username"
          autoCapitalize="none"
          spellCheck={false}
        />
        <InputField
          label="Call sign"
          hint="If you have one and want it shown beside your name among the members of a project. Nobody checks it."
          errors={fields.callSign.errors}
          {...getInputProps(fields.callSign, { type: "text" })}
          autoComplete="off"
          spellCheck={false}
        />
        <SelectField
          label="ITU region"
          hint="New projects begin with it."
          errors={fields.ituRegion.errors}
          {...getSelectProps(fields.ituRegion)}
          options={ITU_REGIONS.map(({ value, label }) => ({ value, label }))}
        />
        <SelectField
          label="Time zone"
          hint="For the days and hours of mails. Pages show UTC."
          errors={fields.timeZone.errors}
          {...getSelectProps(fields.timeZone)}
          options={timeZones.map((zone) => ({ value: zone, label: zone.replaceAll("_", " ") }))}
        />
        <p className="soft text-small">
          {person.email
            ? `E-mail: ${person.email}. Nobody else sees it.`
            : "No e-mail address is known: mails can't reach you."}
        </p>
        <Button name="intent" value="profile" busy={busy}>
          Keep this
        </Button>
      </Form>
    </section>
  );
}
