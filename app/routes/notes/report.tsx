import { getFormProps, getTextareaProps, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { data, Form, Link, useNavigation } from "react-router";
import { requirePerson, requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { TextareaField } from "~/components/ui/Field";
import * as blocks from "~/db/blocks.server";
import * as notes from "~/db/notes.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { reportNote } from "~/services/reports.server";
import type { Route } from "./+types/report";
import { reportSchema } from "./report.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Report a note · Swale" }];

/** For whoever is signed in and may read the note. */
async function requireNote(args: Route.LoaderArgs | Route.ActionArgs) {
  const { project } = await requireProject(args, "project.read");
  const person = await requirePerson(args);
  const found = await notes.findByPublicId(args.params.note);
  if (!found || found.note.projectId !== project.id || found.note.removedAt) throw notFound("note");
  return { ...found, person, here: `/projects/${project.publicId}/notes/${found.note.publicId}` };
}

export async function loader(args: Route.LoaderArgs) {
  const { note, author, person, here } = await requireNote(args);
  const blocked = author !== null && (await blocks.exists(person.id, author.id));
  return {
    here,
    body: note.body.slice(0, SHOWN_CHARACTERS),
    author: author && author.id !== person.id ? { name: author.name, userName: author.userName } : null,
    blocked,
  };
}

export async function action(args: Route.ActionArgs) {
  const { note, person, here } = await requireNote(args);
  const submission = parseForm(await args.request.formData(), { schema: reportSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const done = await reportNote({ note, by: person, reason: submission.value.reason });
  if (done === "too-many") {
    const formErrors = ["You reported many notes today. This one was not reported; try again tomorrow."];
    return data({ lastResult: submission.reply({ formErrors }) }, { status: 429 });
  }
  const told = done === "already" ? "You reported this note already." : "The administrators were told.";
  return redirectWithMessage(here, told);
}

const SHOWN_CHARACTERS = 600;

export default function Report({ loaderData, actionData }: Route.ComponentProps) {
  const { here, body, author, blocked } = loaderData;
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm({
    id: "report",
    lastResult: actionData?.lastResult,
    constraint: getZodConstraint(reportSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: reportSchema }),
  });
  return (
    <div className="max-w-[42rem] space-y-8">
      <section className="space-y-4">
        <h2 className="sweep-title">Report a note</h2>
        <blockquote className="note-line whitespace-pre-wrap">{body}</blockquote>
        <p>
          An administrator of this site will read this note and your reason, and nothing else of the project.
          In a private project that shows them something they could not read otherwise. Owners of the project
          can remove notes too: asking one may be quicker.
        </p>
        <Form method="post" {...getFormProps(form)} className="space-y-4">
          <TextareaField
            label="What is wrong with it"
            errors={fields.reason.errors ?? form.errors}
            {...getTextareaProps(fields.reason)}
          />
          <div className="flex flex-wrap gap-3">
            <Button busy={busy}>Tell the administrators</Button>
            <Link to={here} className="self-center">
              Back to the note
            </Link>
          </div>
        </Form>
      </section>
      {author && !blocked && (
        <section className="space-y-3">
          <h2>Or block {author.name}</h2>
          <p>
            Their notes are folded away for you, and they can't mention, add or invite you. They are not told.
            You can take it back under Settings.
          </p>
          <Form method="post" action="/settings/blocked">
            <input type="hidden" name="userName" value={author.userName} />
            <input type="hidden" name="returnTo" value={here} />
            <Button variant="danger" name="intent" value="block">
              Block {author.name}
            </Button>
          </Form>
        </section>
      )}
      {blocked && author && <p className="soft">You blocked {author.name}.</p>}
    </div>
  );
}
