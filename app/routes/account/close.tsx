import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { data, Form, Link, useNavigation } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { endSession } from "~/auth/session.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { CheckboxField, FieldGroup, InputField } from "~/components/ui/Field";
import * as closing from "~/db/closing.server";
import { closeAccount } from "~/services/closing.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/close";
import { closeSchema } from "./close.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Close the account · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const owned = await closing.findOnlyOwned(person.id);
  return { userName: person.userName, owned: owned.map(({ publicId, title }) => ({ publicId, title })) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: closeSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const { notes, userName } = submission.value;
  const wrong = (reply: Parameters<typeof submission.reply>[0], status: number) =>
    data({ lastResult: submission.reply(reply) }, { status });
  if (userName !== person.userName) {
    return wrong({ fieldErrors: { userName: ["That is not your user name. Nothing was closed."] } }, 400);
  }
  const done = await closeAccount(person.id, notes);
  switch (done.kind) {
    case "owns":
      return wrong({ formErrors: [OWNS] }, 409);
    case "last-administrator":
      return wrong({ formErrors: [LAST_ADMINISTRATOR] }, 409);
    case "closed": {
      const headers = new Headers({ "Set-Cookie": await endSession(args.request) });
      return redirectWithMessage("/", "Your account is closed.", { headers });
    }
    default:
      return done satisfies never;
  }
}

const OWNS = "You are the only owner of the projects above. Nothing was closed.";
const LAST_ADMINISTRATOR =
  "You are the last administrator who can sign in. Nothing was closed. Make somebody else administrator first.";

export default function Close({ loaderData, actionData }: Route.ComponentProps) {
  const { owned, userName } = loaderData;
  return (
    <div className="max-w-[48rem] space-y-6">
      <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
      <h1>Close the account</h1>
      <p>
        Your name, call sign, addresses, ways to sign in, sessions, tokens, inbox and memberships go for good.
        Sweeps, steps, verdicts and plates stay with their projects, under “a former member”: others build on
        them. This can't be undone. <Link to="/settings/my-data">Take all your data along</Link> first, if you
        want it.
      </p>
      {owned.length > 0 && (
        <section className="panel space-y-2 border-l-3 border-l-clay">
          <h2 className="text-base">First: {owned.length === 1 ? "a project" : "projects"} only you own</h2>
          <p>Hand each over under its members, or delete it under its settings.</p>
          <ul className="list-disc pl-5">
            {owned.map(({ publicId, title }) => (
              <li key={publicId}>
                {title}: <Link to={`/projects/${publicId}/members`}>members</Link>,{" "}
                <Link to={`/projects/${publicId}/settings`}>settings</Link>
              </li>
            ))}
          </ul>
        </section>
      )}
      <CloseForm userName={userName} lastResult={actionData?.lastResult} />
    </div>
  );
}

interface CloseFormProps {
  userName: string;
  lastResult?: SubmissionResult<string[]> | null;
}

/** Asks once, by having the user name typed. */
function CloseForm({ userName, lastResult }: CloseFormProps) {
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm({
    id: "close",
    lastResult,
    constraint: getZodConstraint(closeSchema),
    onValidate: ({ formData }) => parseWithZod(formData, { schema: closeSchema }),
  });
  return (
    <Form method="post" {...getFormProps(form)} className="max-w-[34rem] space-y-4">
      {form.errors?.[0] && (
        <p role="alert" className="field-error">
          {form.errors[0]}
        </p>
      )}
      <FieldGroup legend="Your notes">
        <CheckboxField
          type="radio"
          name="notes"
          value="stay"
          defaultChecked
          label="Stay, under “a former member”"
          hint="The threads keep their sense."
        />
        <CheckboxField
          type="radio"
          name="notes"
          value="go"
          label="Are removed, with what was attached to them"
          hint="Those that others answered leave a line that says so."
          errors={fields.notes.errors}
        />
      </FieldGroup>
      <InputField
        label={
          <>
            Type your user name to go on: <span className="font-normal">{userName}</span>
          </>
        }
        errors={fields.userName.errors}
        {...getInputProps(fields.userName, { type: "text" })}
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
      />
      <Button variant="danger" busy={busy}>
        Close my account for good
      </Button>
    </Form>
  );
}
