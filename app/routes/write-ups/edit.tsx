import { data, Form } from "react-router";
import { requireProject } from "~/auth/require.server";
import { EditConflict } from "~/components/edit-conflict/EditConflict";
import { writeDraft } from "~/components/notes/draft";
import { sendOrSayWhy } from "~/components/notes/unsent";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button, LinkButton } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { Tag } from "~/components/ui/Tag";
import * as writeUps from "~/db/write-ups.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseWas } from "~/services/merge-edit";
import { parseForm } from "~/services/parse-form";
import { findChoices } from "~/services/write-ups/choices.server";
import { changeDraft, type DraftText, deleteDraft } from "~/services/write-ups/drafts.server";
import { drawDraft } from "~/services/write-ups/preview.server";
import type { Route } from "./+types/edit";
import { Desk } from "./components/Desk.tsx";
import { requireWriteUp } from "./require-write-up.server.ts";
import { editSchema } from "./write-ups.schema.ts";

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `${data?.writeUp.title ?? "Write-up"} · Swale` },
];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "write-up.edit");
  const { writeUp } = await requireWriteUp(access, args.params.writeUp);
  const [choices, lastNumber, drawn] = await Promise.all([
    findChoices(access.project.id),
    writeUps.findLastNumber(writeUp.id),
    drawDraft(access, writeUp.body),
  ]);
  const { publicId, title, body, publishedNumber, takenBackAt } = writeUp;
  return {
    projectId: access.project.publicId,
    writer: access.person?.userName ?? "",
    writeUp: { publicId, title, body, publishedNumber, takenBackAt, wasPublished: lastNumber > 0 },
    choices,
    drawn: { text: body, ...drawn },
  };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "write-up.edit");
  const { writeUp } = await requireWriteUp(access, args.params.writeUp);
  const submission = parseForm(await args.request.formData(), { schema: editSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, 400);
  const value = submission.value;
  const base = `/projects/${access.project.publicId}/write-ups`;
  switch (value.intent) {
    case "look": {
      const { title, body } = value;
      return { looked: { title, body, drawn: { text: body, ...(await drawDraft(access, body)) } } };
    }
    case "keep": {
      const { title, body } = value;
      const was = parseWas<DraftText>(value.was);
      const change = await changeDraft(writeUp.id, access.project, was, { title, body });
      if (change.kind === "gone") throw notFound("write-up");
      if (change.kind === "conflict") return data({ conflict: change.conflict }, 409);
      if (!value.here) return redirectWithMessage(`${base}/${writeUp.publicId}/edit`, "The draft is kept.");
      const now = (await writeUps.findByPublicId(writeUp.publicId))?.writeUp;
      return { kept: { title: now?.title ?? title, body: now?.body ?? body } };
    }
    case "delete": {
      const removal = await deleteDraft(writeUp.id);
      if (removal === "gone") throw notFound("write-up");
      if (removal === "removed") return redirectWithMessage(base, "The draft is deleted.");
      const words = "It was published once, so it stays; it can be taken back. Nothing was changed.";
      return redirectWithMessage(`${base}/${writeUp.publicId}/edit`, words);
    }
    default:
      return value satisfies never;
  }
}

export function clientAction({ serverAction }: Route.ClientActionArgs) {
  return sendOrSayWhy(() => serverAction());
}

export default function EditWriteUp({ loaderData, actionData }: Route.ComponentProps) {
  const { projectId, writeUp, writer } = loaderData;
  const base = `/projects/${projectId}/write-ups`;
  const draftKey = `${writer}:write-up:${writeUp.publicId}`;
  const forget = () => {
    writeDraft(draftKey, null);
    writeDraft(`${draftKey}:title`, null);
  };
  const conflict = actionData && "conflict" in actionData ? actionData.conflict : null;
  return (
    <article className="grid gap-6">
      <header className="flex flex-wrap items-end justify-between gap-3">
        <div className="grid gap-2">
          <Breadcrumbs items={[{ label: "Write-ups", to: base }]} />
          <h2 className="sweep-title">{writeUp.title}</h2>
        </div>
        <State writeUp={writeUp} />
      </header>
      {conflict ? (
        // The choice below holds both texts; the one on this device must not come back over it.
        <div onSubmit={forget}>
          <EditConflict conflict={conflict} labels={{ title: "Title", body: "Text" }} intent="keep" />
        </div>
      ) : (
        <Desk key={writeUp.publicId} data={loaderData} answer={actionData ?? null} draftKey={draftKey} />
      )}
      <footer className="flex flex-wrap items-center gap-3 border-t border-rule pt-4">
        {writeUp.publishedNumber !== null && (
          <Dialog label="Take it back" title="Take this write-up back?">
            <p>
              Its address then says that it was taken back, and nobody reads it there. What others copied of
              it stays with them. The draft and the versions stay here, and it can be published again.
            </p>
            <Form method="post" action={`${base}/${writeUp.publicId}/publish`}>
              <Button variant="danger" name="intent" value="take-back">
                Take it back
              </Button>
            </Form>
          </Dialog>
        )}
        {!writeUp.wasPublished && (
          <Dialog label="Delete the draft" icon="remove" title="Delete this draft?">
            <p>Its text is gone then. What it names and shows of the project stays.</p>
            <Form method="post" onSubmit={forget}>
              <Button variant="danger" name="intent" value="delete">
                Delete the draft
              </Button>
            </Form>
          </Dialog>
        )}
      </footer>
    </article>
  );
}

function State({ writeUp }: { writeUp: Route.ComponentProps["loaderData"]["writeUp"] }) {
  if (writeUp.publishedNumber !== null) {
    return (
      <p className="flex flex-wrap items-center gap-3">
        <Tag tone="moss">published</Tag>
        <LinkButton to={`/write-ups/${writeUp.publicId}`} variant="quiet" size="small">
          Read version {writeUp.publishedNumber}
        </LinkButton>
      </p>
    );
  }
  return writeUp.takenBackAt ? <Tag tone="clay">taken back</Tag> : <Tag>draft</Tag>;
}
