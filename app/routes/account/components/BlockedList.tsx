import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { InputField } from "~/components/ui/Field";
import { Table } from "~/components/ui/Table";
import { blockSchema } from "../blocked.schema.ts";

export function BlockedList({ blocked }: { blocked: { userName: string; name: string; at: string }[] }) {
  if (blocked.length === 0) {
    return (
      <EmptyState drawing="search" title="Nobody is blocked">
        Under any note, “Report or block” does it; or name somebody below.
      </EmptyState>
    );
  }
  return (
    <Table
      caption="People you blocked"
      rows={blocked}
      rowKey={(one) => one.userName}
      columns={[
        {
          key: "name",
          label: "Name",
          cell: (one) => (
            <span>
              {one.name} <span className="soft">{one.userName}</span>
            </span>
          ),
        },
        { key: "since", label: "Since", cell: (one) => <DateTime at={one.at} dateOnly /> },
        {
          key: "unblock",
          label: "Unblock",
          cell: (one) => (
            <Form method="post">
              <input type="hidden" name="userName" value={one.userName} />
              <Button variant="quiet" size="small" name="intent" value="unblock">
                Unblock<span className="sr-only"> {one.name}</span>
              </Button>
            </Form>
          ),
        },
      ]}
    />
  );
}

export function BlockForm({ lastResult }: { lastResult?: SubmissionResult<string[]> | null }) {
  const busy = useNavigation().formData?.get("intent") === "block";
  const [form, fields] = useForm({
    id: "block",
    lastResult,
    constraint: getZodConstraint(blockSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: blockSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>Block somebody</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="User name"
          errors={fields.userName.errors}
          {...getInputProps(fields.userName, { type: "text" })}
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
        />
        <Button variant="danger" name="intent" value="block" busy={busy}>
          Block
        </Button>
      </Form>
    </section>
  );
}
