import type { SubmissionResult } from "@conform-to/react";
import { data, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import type { Conflict } from "~/components/edit-conflict/EditConflict";
import * as projects from "~/db/projects.server";
import * as webmentions from "~/db/webmentions.server";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { parseWas } from "~/services/merge-edit";
import { parseForm } from "~/services/parse-form";
import {
  type AboutValues,
  changeAbout,
  changeBands,
  changeLicence,
  deleteProject,
} from "~/services/projects.server";
import { CitedElsewhere } from "../webmention/components/CitedElsewhere.tsx";
import type { Route } from "./+types/settings";
import { bandInHertz, bandRowOf } from "./band-rows.ts";
import { AboutConflict } from "./components/AboutConflict.tsx";
import { AboutForm } from "./components/AboutForm.tsx";
import { BandsForm } from "./components/BandsForm.tsx";
import { DeleteForm } from "./components/DeleteForm.tsx";
import { LicenceForm } from "./components/LicenceForm.tsx";
import { projectSettingsSchema } from "./project.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "Project settings · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.edit");
  const [bands, mentionsWaiting] = await Promise.all([
    projects.findDesignBands(project.id),
    webmentions.countWaiting(project.id),
  ]);
  const { title, summary, visibility, ituRegion } = project;
  return {
    was: { title, summary, visibility, ituRegion },
    about: aboutOf(project),
    bands: bands.map(bandRowOf),
    licence: project.licence,
    mentionsWaiting,
  };
}

export async function action(args: Route.ActionArgs) {
  const { project, may, person } = await requireProject(args, "project.edit");
  const submission = parseForm(await args.request.formData(), { schema: projectSettingsSchema });
  if (submission.status !== "success") return answer(submission.reply(), 400);
  const value = submission.value;
  const here = `/projects/${project.publicId}/settings`;
  switch (value.intent) {
    case "about": {
      const { intent: _, was, ...about } = value;
      const conflict = await changeAbout(project.id, parseWas(was), about, person?.id);
      if (conflict) return answer(submission.reply(), 409, conflict);
      return redirectWithMessage(here, "The project was changed.");
    }
    case "bands":
      await changeBands(project.id, value.bands.map(bandInHertz), person?.id);
      return redirectWithMessage(here, "The design bands were changed.");
    case "licence":
      await changeLicence(project.id, value.licence, person?.id);
      return redirectWithMessage(here, "New plates are proposed under this licence.");
    case "delete": {
      if (!may("project.delete")) throw refused("Only owners delete a project. Nothing was changed.");
      if (value.title !== project.title) {
        const fieldErrors = { title: ["That is not the title. Nothing was deleted."] };
        return answer(submission.reply({ fieldErrors }), 400);
      }
      await deleteProject(project.id);
      return redirectWithMessage("/projects", "The project and its files were deleted.");
    }
    default:
      return value satisfies never;
  }
}

function answer(lastResult: SubmissionResult<string[]>, status: number, conflict?: Conflict) {
  return data({ lastResult, conflict }, { status });
}

function aboutOf({ title, summary, visibility, ituRegion }: AboutValues) {
  return { title, summary, visibility, ituRegion: ituRegion === null ? "" : String(ituRegion) };
}

export default function ProjectSettings({ loaderData, actionData }: Route.ComponentProps) {
  const last = actionData?.lastResult;
  const lastOf = (intent: string) => (last?.initialValue?.intent === intent ? last : undefined);
  return (
    <div className="max-w-[52rem] space-y-12">
      {actionData?.conflict ? (
        <AboutConflict conflict={actionData.conflict} />
      ) : (
        <AboutForm
          about={loaderData.about}
          was={JSON.stringify(loaderData.was)}
          lastResult={lastOf("about")}
        />
      )}
      <BandsForm
        key={JSON.stringify(loaderData.bands)}
        bands={loaderData.bands}
        lastResult={lastOf("bands")}
      />
      <LicenceForm licence={loaderData.licence} errors={lastOf("licence")?.error?.licence ?? undefined} />
      <CitedElsewhere waiting={loaderData.mentionsWaiting} />
      <section className="space-y-3">
        <h2>Bundle</h2>
        <p>
          <Link to="../bundle" relative="path">
            The whole project as one file
          </Link>{" "}
          <span className="soft">to keep, to hand on, or to take into another Swale.</span>
        </p>
      </section>
      <DeleteForm title={loaderData.about.title} lastResult={lastOf("delete")} />
    </div>
  );
}
