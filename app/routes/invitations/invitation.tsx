import { data, Form } from "react-router";
import { findPerson, requirePerson } from "~/auth/require.server";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import * as projects from "~/db/projects.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { acceptInvitation, findDoor } from "~/services/invitations.server";
import type { Route } from "./+types/invitation";

export const meta: Route.MetaFunction = () => [
  { title: "Invitation · Swale" },
  { name: "robots", content: "noindex" },
];

/** Whoever holds the address sees the title and the role, and nothing else of the project. */
export async function loader(args: Route.LoaderArgs) {
  const door = await findDoor(args.params.token);
  if (!door) throw notFound("invitation");
  const person = await findPerson(args);
  const found = person && (await projects.findWithRoleById(door.project.id, person.id));
  const { role, email, expiresAt } = door.invitation;
  return data(
    {
      title: door.project.title,
      project: found?.role ? door.project.publicId : null,
      role,
      by: door.by?.name ?? "A former member",
      byMail: email !== null,
      state: door.state,
      expiresAt: expiresAt.toISOString(),
      person: person && { name: person.name },
    },
    { status: door.state === "open" || found?.role ? 200 : 410, headers: { "Cache-Control": "no-store" } },
  );
}

export function headers({ loaderHeaders }: Route.HeadersArgs) {
  return loaderHeaders;
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const door = await findDoor(args.params.token);
  if (!door) throw notFound("invitation");
  const done = await acceptInvitation(door, person);
  const page = `/projects/${door.project.publicId}`;
  if (done === "joined") return redirectWithMessage(page, `You are ${door.invitation.role} here now.`);
  if (done === "already") return redirectWithMessage(page, "You are a member here already.");
  return redirectWithMessage(`/invitations/${args.params.token}`, "It opens nothing any more.");
}

export default function Invitation({ loaderData, params }: Route.ComponentProps) {
  const { title, project, role, by, byMail, state, expiresAt, person } = loaderData;
  const here = `/invitations/${params.token}`;
  return (
    <div className="mx-auto max-w-[36rem] space-y-6 pt-4">
      <header className="space-y-1">
        <p className="soft">An invitation to</p>
        <h1>{title}</h1>
      </header>
      {project ? (
        <>
          <p>You are a member of this project already.</p>
          <LinkButton to={`/projects/${project}`}>Go to the project</LinkButton>
        </>
      ) : state !== "open" ? (
        <p role="alert">{OVER[state]}</p>
      ) : (
        <>
          <p>
            {by} invites you as <strong>{role}</strong>: you may {MAY[role]}. Until{" "}
            <DateTime at={expiresAt} />
            {byMail ? ", once: whoever holds this address can take it." : "."}
          </p>
          {person ? (
            <Form method="post" className="space-y-3">
              <Button>Join as {person.name}</Button>
              <p className="soft text-small">
                Its members see your name, your user name and your call sign if you gave one, not your
                address.
              </p>
            </Form>
          ) : (
            <div className="space-y-3">
              <LinkButton to={`/sign-in?next=${encodeURIComponent(here)}`} icon="person">
                Sign in and come back
              </LinkButton>
              <p className="soft text-small">
                With GitHub or any e-mail address, also another than the one this came to. Somebody new gets
                an account on the way.
              </p>
            </div>
          )}
        </>
      )}
    </div>
  );
}

const MAY = {
  experimenter: "take sweeps in, change readings, settle dips and write notes",
  commenter: "write notes and propose causes",
  reader: "read everything in it",
};
const OVER = {
  ended: "This invitation has ended. Nothing was changed. Ask whoever sent it for another.",
  revoked: "This invitation was revoked. Nothing was changed. Ask whoever sent it.",
  taken: "This invitation was taken already; it works once. Ask whoever sent it for another.",
};
