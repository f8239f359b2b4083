import { data, Link, redirect, type ShouldRevalidateFunctionArgs } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { findMade, makePlate } from "~/services/plates/make.server";
import { subjectOf } from "~/services/plates/subject";
import type { Route } from "./+types/new";
import { Chooser } from "./components/Chooser";
import { PlateForm } from "./components/PlateForm";
import { findMended, openDraft } from "./draft.server";
import { errorsOf, plateSchema, textsOfForm, wrongSchema } from "./plates.schema";
import { previewOfForm } from "./preview-plate.server";
import { findSubjects } from "./subjects.server";
import { KINDS } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "New plate · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "plate.make");
  const { project } = access;
  const draft = await openDraft(access, new URL(args.request.url).searchParams);
  return {
    projectId: project.publicId,
    visibility: project.visibility,
    draft,
    subjects: draft ? null : await findSubjects(project.id),
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "plate.make");
  if (!person) throw refused("Sign in first. Nothing was frozen.");
  const form = await args.request.formData();
  const sent = { texts: textsOfForm(form), wrong: String(form.get("wrong") ?? "") };
  const again = async (status: number, more: Partial<Awaited<ReturnType<typeof previewOfForm>>> = {}) =>
    data({ sent, ...(await previewOfForm(project, form)), ...more }, status);
  const intent = String(form.get("intent"));
  switch (intent) {
    case "show":
      return again(200);
    case "freeze": {
      const draw = String(form.get("draw") ?? "");
      const before = await findMade({ project, by: person }, draw);
      if (before) throw redirect(`/plates/${before.publicId}`);
      const mended = await findMended(project.id, String(form.get("mends") ?? "") || null);
      const subject = subjectOf(mended?.record.subject ?? String(form.get("from")));
      if (!subject) throw data("The form does not say what the plate is of. Nothing was frozen.", 400);
      const parsed = plateSchema.safeParse(sent.texts);
      const wrong = mended ? wrongSchema.safeParse(sent.wrong) : null;
      if (!parsed.success || wrong?.error) {
        const errors = {
          ...(parsed.error && errorsOf(parsed.error)),
          ...(wrong?.error && { wrong: wrong.error.issues.map(({ message }) => message) }),
        };
        return again(400, { errors });
      }
      const made = await makePlate({
        project,
        subject,
        choices: parsed.data,
        by: person,
        draw,
        mends: mended && wrong ? { plate: mended.plate, reason: wrong.data } : null,
      });
      if ("problem" in made) return again(409, { problem: `Nothing was frozen. ${made.problem}` });
      return redirectWithMessage(
        `/plates/${made.publicId}`,
        mended ? "The new version is frozen; the old one points to it." : "The plate is frozen.",
      );
    }
    default:
      throw data("The form asked for something this page does not do. Nothing was frozen.", 400);
  }
}

/** A preview changes nothing that the form was opened with. */
export function shouldRevalidate({ formAction, defaultShouldRevalidate }: ShouldRevalidateFunctionArgs) {
  return formAction?.endsWith("/plates/preview") ? false : defaultShouldRevalidate;
}

export default function NewPlate({ loaderData, actionData }: Route.ComponentProps) {
  const { projectId, draft, subjects } = loaderData;
  const base = `/projects/${projectId}`;
  const mends = draft?.mends;
  const kind = draft ? subjectOf(draft.from)?.kind : null;
  return (
    <article className="grid gap-6">
      <header className="grid gap-2">
        <Breadcrumbs items={[{ label: "Plates", to: `${base}/plates` }]} />
        <h2 className="sweep-title">{mends ? `Plate ${mends.number}: a new version` : "New plate"}</h2>
        <p className="soft max-w-[72ch]">
          {mends
            ? `Version ${mends.version} stays as it is and points to this one.`
            : kind
              ? `${KINDS[kind]}, frozen with its numbers and with how they came about.`
              : "What is to be frozen?"}
        </p>
      </header>
      {subjects && <Chooser projectId={projectId} subjects={subjects} />}
      {draft && !draft.preview && !actionData ? (
        <div className="panel border-l-3 border-l-clay grid gap-2">
          <p>{draft.problem}</p>
          <p>
            <Link to={`${base}/plates/new`}>Choose something else</Link>
          </p>
        </div>
      ) : (
        draft && (
          <PlateForm
            key={draft.draw}
            projectId={projectId}
            visibility={loaderData.visibility}
            draft={draft}
            answer={actionData ?? null}
          />
        )
      )}
    </article>
  );
}
