import { data, Form, Link, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Button } from "~/components/ui/Button";
import * as follows from "~/db/follows.server";
import * as mailChoices from "~/db/mail-choices.server";
import { notFound, refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { findSubject } from "~/services/follow-subjects.server";
import type { Route } from "./+types/follow";
import { MailModeForm } from "./components/MailModeForm.tsx";
import { FOLLOW_KINDS, followSchema } from "./inbox.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Follow or mute · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person } = await requireMember(args);
  const search = new URL(args.request.url).searchParams;
  const kind = FOLLOW_KINDS.find((one) => one === search.get("kind")) ?? "project";
  const subject = await findSubject(project, kind, search.get("subject") ?? undefined);
  if (!subject) throw notFound(kind);
  const whole = { kind: "project" as const, id: project.publicId };
  const [said, modes] = await Promise.all([
    follows.findByUser(person.id, [subject, whole]),
    mailChoices.findAllByUser(person.id),
  ]);
  const stateOf = ({ kind, id }: follows.Subject) => {
    const muted = said.get(`${kind}:${id}`);
    return muted === undefined ? "neither" : muted ? "mute" : "follow";
  };
  return {
    subjects: [
      ...(kind === "project" ? [] : [{ ...subject, state: stateOf(subject) }]),
      { ...whole, title: project.title, path: `/projects/${project.publicId}`, state: stateOf(whole) },
    ],
    mode: modes.find(({ scope }) => scope === project.publicId)?.mode ?? null,
    project: project.publicId,
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireMember(args);
  const parsed = followSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That form was not understood. Nothing was changed.", 400);
  const value = parsed.data;
  if (value.intent === "mail") {
    if (value.mode === "usual") await mailChoices.remove(person.id, project.publicId);
    else await mailChoices.set(person.id, project, value.mode);
    return redirectWithMessage(`/projects/${project.publicId}/follow`, "Mails come so from now on.");
  }
  const subject = await findSubject(project, value.kind, value.subject);
  if (!subject) throw notFound(value.kind);
  if (value.intent === "neither") await follows.remove(person.id, subject);
  else await follows.set(person.id, project.id, subject, value.intent === "mute");
  const here = new URLSearchParams({ kind: subject.kind, subject: subject.id });
  return redirect(`/projects/${project.publicId}/follow?${here}`);
}

async function requireMember(args: Route.LoaderArgs | Route.ActionArgs) {
  const { project, person, membership } = await requireProject(args, "project.read");
  if (person && membership) return { project, person };
  if (!person && args.request.method === "GET") {
    throw redirect(`/sign-in?next=${encodeURIComponent(`/projects/${project.publicId}/follow`)}`);
  }
  throw refused("Members follow what happens in a project. Nothing was changed.");
}

export default function Follow({ loaderData }: Route.ComponentProps) {
  const { subjects, mode, project } = loaderData;
  return (
    <div className="grid gap-8 max-w-[48rem]">
      <h2>What you hear of</h2>
      {subjects.map(({ kind, id, title, path, state }) => (
        <section key={kind} className="grid gap-2" aria-labelledby={`follow-${kind}`}>
          <h3 id={`follow-${kind}`}>
            <Link to={path}>{title}</Link>
          </h3>
          <p>{SAID[state as keyof typeof SAID]}</p>
          <Form method="post" className="flex flex-wrap gap-3">
            <input type="hidden" name="kind" value={kind} />
            <input type="hidden" name="subject" value={id} />
            {CHOICES.filter(({ intent }) => intent !== state).map(({ intent, label }) => (
              <Button key={intent} variant="quiet" name="intent" value={intent}>
                {label}
              </Button>
            ))}
          </Form>
        </section>
      ))}
      <section className="grid gap-2" aria-labelledby="follow-mail">
        <h3 id="follow-mail">Mails about this project</h3>
        <MailModeForm scope={project} mode={mode} label="Mails" intent="mail" />
      </section>
    </div>
  );
}

const SAID = {
  follow: "You follow it: what is said and found there comes to your inbox.",
  mute: "It is muted: nothing of it comes to you, not even when you are named.",
  neither: "You hear when somebody answers or names you, and of what you follow in it.",
};
const CHOICES = [
  { intent: "follow", label: "Follow" },
  { intent: "mute", label: "Mute" },
  { intent: "neither", label: "Neither" },
] as const;
