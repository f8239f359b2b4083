import { data } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import * as mailChoices from "~/db/mail-choices.server";
import * as projects from "~/db/projects.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { USUAL_MODE } from "~/services/notice-mails.server";
import type { Route } from "./+types/mail";
import { MailModeForm } from "./components/MailModeForm.tsx";
import { mailSchema } from "./inbox.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Mails · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const [choices, { rows }] = await Promise.all([
    mailChoices.findAllByUser(person.id),
    projects.findPageByUser(person.id),
  ]);
  const modeOf = new Map(choices.map(({ scope, mode }) => [scope, mode]));
  return {
    all: modeOf.get(mailChoices.ALL) ?? USUAL_MODE,
    projects: rows.map(({ publicId, title }) => ({ publicId, title, mode: modeOf.get(publicId) ?? null })),
    email: person.email,
    timeZone: person.timeZone,
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args);
  const parsed = mailSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That form was not understood. Nothing was changed.", 400);
  const { scope, mode } = parsed.data;
  const ofAll = scope === mailChoices.ALL;
  if (mode === "usual") await mailChoices.remove(person.id, scope);
  else if (ofAll) await mailChoices.set(person.id, null, mode);
  else {
    const found = await projects.findWithRole(scope, person.id);
    if (!found?.role) throw notFound("project");
    await mailChoices.set(person.id, found.project, mode);
  }
  return redirectWithMessage("/settings/mail", "Mails come so from now on.");
}

export default function MailSettings({ loaderData }: Route.ComponentProps) {
  const { all, projects, email, timeZone } = loaderData;
  return (
    <div className="grid gap-8 max-w-[48rem]">
      <div className="grid gap-2">
        <Breadcrumbs items={[{ label: "Settings", to: "/settings" }]} />
        <h1>How often mails come</h1>
        <p className="soft">
          {email
            ? `They go to ${email}.`
            : "No address is known, so no mails come; add one under Signing in."}{" "}
          A day begins at seven in the morning in your time zone, {timeZone}.
        </p>
      </div>
      <section className="grid gap-3" aria-labelledby="all">
        <h2 id="all">All projects</h2>
        <MailModeForm scope="all" mode={all} label="Mails" />
      </section>
      {projects.length > 0 && (
        <section className="grid gap-4" aria-labelledby="by-project">
          <h2 id="by-project">By project</h2>
          {projects.map(({ publicId, title, mode }) => (
            <MailModeForm key={publicId} scope={publicId} mode={mode} label={title} />
          ))}
        </section>
      )}
    </div>
  );
}
