import { data, Form, Link, redirect } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Button, LinkButton } from "~/components/ui/Button";
import { EmptyState } from "~/components/ui/EmptyState";
import { SelectField } from "~/components/ui/Field";
import * as notices from "~/db/notices.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { inboxOf, openNotice } from "~/services/inbox.server";
import type { Route } from "./+types/inbox";
import { InboxThreads } from "./components/InboxThreads.tsx";
import { inboxSchema } from "./inbox.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Inbox · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const search = new URL(args.request.url).searchParams;
  const project = search.get("project") || undefined;
  const [inbox, projects] = await Promise.all([
    inboxOf(person.id, { cursor: search.get("cursor") ?? undefined, project }),
    notices.findProjects(person.id),
  ]);
  return { ...inbox, projects, project: project ?? "" };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const parsed = inboxSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That form was not understood. Nothing was changed.", 400);
  const value = parsed.data;
  switch (value.intent) {
    case "open": {
      const to = await openNotice(person.id, value.notice);
      if (!to) throw notFound("notice");
      return redirect(to);
    }
    case "read":
      await openNotice(person.id, value.notice);
      return redirectWithMessage("/inbox", "Marked as read.");
    case "read-all":
      await notices.setRead(person.id, { project: value.project });
      return redirectWithMessage("/inbox", "Everything is marked as read.");
    default:
      return value satisfies never;
  }
}

export default function Inbox({ loaderData }: Route.ComponentProps) {
  const { threads, projects, project, nextCursor } = loaderData;
  const unread = threads.some((thread) => thread.unread > 0);
  return (
    <div className="grid gap-6 max-w-[60rem]">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <h1>Inbox</h1>
        <Link to="/settings/mail">How often mails come</Link>
      </div>
      {projects.length > 0 && (
        <div className="flex flex-wrap items-end gap-4">
          <Form className="flex flex-wrap items-end gap-3">
            <SelectField
              key={project}
              label="Project"
              name="project"
              defaultValue={project}
              options={[
                { value: "", label: "All projects" },
                ...projects.map(({ publicId, title }) => ({ value: publicId, label: title })),
              ]}
            />
            <button type="submit" className="button button-quiet">
              Show
            </button>
          </Form>
          {unread && (
            <Form method="post">
              {project && <input type="hidden" name="project" value={project} />}
              <Button variant="quiet" name="intent" value="read-all">
                Mark everything here as read
              </Button>
            </Form>
          )}
        </div>
      )}
      {threads.length === 0 ? (
        <EmptyState
          drawing="notes"
          title="Nothing has come"
          action={
            <LinkButton to="/projects" variant="quiet">
              Your projects
            </LinkButton>
          }
        >
          You hear when somebody answers you or names you, and of what you follow.
        </EmptyState>
      ) : (
        <InboxThreads threads={threads} />
      )}
      {nextCursor && (
        <p>
          <Link to={`?${new URLSearchParams({ ...(project ? { project } : {}), cursor: nextCursor })}`}>
            Earlier
          </Link>
        </p>
      )}
    </div>
  );
}
