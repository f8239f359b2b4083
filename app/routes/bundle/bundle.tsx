import { Form, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import * as runs from "~/db/bundle-runs.server";
import { brokenForm, notFound } from "~/errors";
import { askForBundle, removeRun } from "~/services/bundle/runs.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/bundle";
import "./bundle.css";
import { bundleSchema } from "./bundle.schema.ts";
import { RunList } from "./components/RunList.tsx";
import { shownRun } from "./shown-run.server";

export const meta: Route.MetaFunction = () => [{ title: "Bundle · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may } = await requireProject(args, "project.export");
  const found = await runs.findExports(project.id);
  return { id: project.publicId, mayEdit: may("project.edit"), runs: found.map(shownRun) };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "project.export");
  const submission = parseForm(await args.request.formData(), { schema: bundleSchema });
  if (submission.status !== "success" || !person) throw brokenForm();
  const value = submission.value;
  const here = `/projects/${project.publicId}/bundle`;
  switch (value.intent) {
    case "make": {
      const { there } = await askForBundle(project.id, person.id);
      return redirectWithMessage(here, there ? "One is being made already." : "The bundle is being made.");
    }
    case "remove": {
      const run = await runs.findByPublicId(value.run);
      if (run?.kind !== "export" || run.projectId !== project.id) throw notFound("bundle");
      await removeRun(run);
      return redirectWithMessage(here, "The bundle was removed. The project is as it was.");
    }
    default:
      return value satisfies never;
  }
}

export default function Bundle({ loaderData }: Route.ComponentProps) {
  const { id, mayEdit } = loaderData;
  const open = loaderData.runs.some(({ state }) => state === "waiting" || state === "running");
  const busy = useNavigation().formData?.get("intent") === "make";
  return (
    <div className="max-w-[52rem] space-y-8">
      <div className="space-y-3">
        {mayEdit && <Breadcrumbs items={[{ label: "Settings", to: `/projects/${id}/settings` }]} />}
        <h2 className="sweep-title">The whole project as one file</h2>
        <p className="max-w-[72ch]">
          A bundle is a ZIP with everything of the project, in open formats. It opens from disk without Swale,
          and any Swale can take it in again.
        </p>
        {!open && (
          <Form method="post">
            <Button name="intent" value="make" icon="download" busy={busy}>
              Make a bundle
            </Button>
          </Form>
        )}
      </div>
      {loaderData.runs.length > 0 && (
        <section aria-label="Bundles">
          <RunList
            runs={loaderData.runs}
            base={`/projects/${id}/bundle`}
            verb={{ doing: "The bundle is being made", failed: "The bundle could not be made" }}
          />
        </section>
      )}
      <section className="space-y-3">
        <h2>What is in it</h2>
        <dl className="bundle-parts">
          {PARTS.map(([what, how]) => (
            <div key={what}>
              <dt>{what}</dt>
              <dd className="soft">{how}</dd>
            </div>
          ))}
        </dl>
        <p className="soft max-w-[72ch]">
          People are in it by the names that this project shows: no e-mail addresses, no ways to sign in.
          Originals of pictures are in it as they were given and may say where they were taken. Whoever you
          hand it to has all of that. A bench that was lent from another project stays there. A bundle is kept
          for 7 days and then removed; owners and experimenters may make and download one.
        </p>
      </section>
    </div>
  );
}

const PARTS: [string, string][] = [
  ["Originals", "every file as it was given, byte for byte"],
  ["Points", "each reading as CSV with all digits, and as Touchstone where there is phase"],
  ["Readings, analyses, dips", "JSON with a written shape: settings, limits, corrections, versions"],
  ["Notes", "Markdown, pages, and W3C Web Annotations"],
  ["Antenna, steps, trails, verdicts, benches", "every version, with references and own cables"],
  ["Plates and write-ups", "every frozen form, with the originals they rest on"],
  ["Photographs and attachments", "the originals and what pages show"],
  ["Sums", "a BagIt bag (RFC 8493): one command tells whether it is whole"],
];
