import { data, Form, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { takeIn } from "~/services/intake.server";
import type { Route } from "./+types/sweep";
import { bytesOf, requireAttachment } from "./require-attachment.server.ts";

export const meta: Route.MetaFunction = () => [{ title: "Take in as a sweep · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "sweep.add");
  const { attachment } = await requireAttachment(access, args.params.attachment);
  return { name: attachment.name, sizeBytes: attachment.sizeBytes, project: access.project.publicId };
}

/** Takes a file of a note in as a sweep; the note keeps its file. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const { attachment } = await requireAttachment(access, args.params.attachment);
  const bytes = await bytesOf(attachment, "file");
  const file = { name: attachment.name, bytes };
  const taken = await takeIn({ project, by: person, file, keepUnread: true });
  if (taken.kind === "refused") return data({ problem: taken.problem.message }, 422);
  const page = `/projects/${project.publicId}/sweeps/${taken.sweepPublicId}`;
  switch (taken.kind) {
    case "read":
      return redirectWithMessage(page, "The file was taken in as a sweep.");
    case "twice":
      return redirectWithMessage(page, "This file is already here as this sweep. It was not stored again.");
    case "unread":
      return redirectWithMessage(`${page}/reading`, "The file is kept: say here how it is to be read.");
    default:
      return taken satisfies never;
  }
}

export default function TakeInAttachment({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <article className="grid gap-4 max-w-[72ch]">
      <h1>Take in as a sweep</h1>
      <p>
        “{loaderData.name}” stands in a note. Taken in, it is read and analysed like every sweep of the
        project, and the note keeps its file.
      </p>
      {actionData?.problem && (
        <p role="alert" className="field-error">
          {actionData.problem} Nothing was stored.
        </p>
      )}
      <Form method="post" className="flex flex-wrap items-center gap-4">
        <Button>Take it in</Button>
        <Link to={`/projects/${loaderData.project}/sweeps`}>Leave it</Link>
      </Form>
    </article>
  );
}
