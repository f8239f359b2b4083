import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { ThreadSection } from "~/components/notes/ThreadSection";
import { Photographs } from "~/components/photographs/Photographs";
import { Markdown } from "~/components/ui/Markdown";
import * as benches from "~/db/benches.server";
import { brokenForm, refused } from "~/errors";
import { takenWords, takeReferences } from "~/services/bench-references.server";
import { deleteBench, setRetired } from "~/services/benches.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/bench";
import { readBenchForm } from "./bench-form.server";
import { loadBenchPage } from "./bench-page.server";
import { benchActionSchema, parseWish } from "./benches.schema";
import { BenchHead } from "./components/BenchHead";
import { Parts } from "./components/Parts";
import { Quality } from "./components/Quality";
import { References } from "./components/References";
import { TakenWith } from "./components/TakenWith";
import { Versions } from "./components/Versions";
import { pickVersion, requireBench, requireOwnBench } from "./require-bench.server";

export const meta: Route.MetaFunction = ({ data }) => [{ title: `${data?.bench.name ?? "Bench"} · Swale` }];

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await requireBench(access, args.params.bench);
  const search = new URL(args.request.url).searchParams;
  return loadBenchPage(access, found, parseWish(search), search.get("version"));
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "bench.edit");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const { bench } = await requireOwnBench(access, args.params.bench);
  const { fields, files, fault } = await readBenchForm(args.request);
  const submission = parseForm(fields, { schema: benchActionSchema });
  if (submission.status !== "success") throw brokenForm();
  const value = submission.value;
  const list = `/projects/${project.publicId}/benches`;
  const page = `${list}/${bench.publicId}`;
  switch (value.intent) {
    case "references": {
      if (fault) return data({ fault }, { status: 400 });
      if (files.length === 0) {
        return data({ fault: "No file was chosen. Nothing was stored." }, { status: 400 });
      }
      const { version } = pickVersion(await benches.findVersions(bench.id), value.version);
      const taken = await takeReferences({ bench, version, project, by: person }, files);
      return redirectWithMessage(`${page}?version=${version.publicId}`, takenWords(taken));
    }
    case "retire":
      await setRetired(bench, person, true);
      return redirectWithMessage(
        page,
        "The bench is put away: it is not offered to new sweeps. Old ones keep it.",
      );
    case "resume":
      await setRetired(bench, person, false);
      return redirectWithMessage(page, "The bench is in use again.");
    case "delete": {
      if (await deleteBench(bench)) {
        return redirectWithMessage(
          list,
          `“${bench.name}” was deleted with its reference sweeps and photographs.`,
        );
      }
      return redirectWithMessage(
        page,
        "Sweeps were taken with this bench, so it was not deleted: their numbers rest on it. Put it away instead.",
      );
    }
    default:
      return value satisfies never;
  }
}

export default function Bench({ loaderData, actionData }: Route.ComponentProps) {
  const { project, bench, photographs, may } = loaderData;
  return (
    <article className="grid gap-8">
      <BenchHead data={loaderData} />
      <div className="project-page">
        <div className="grid gap-8 content-start min-w-0">
          {bench.descriptionHtml && <Markdown html={bench.descriptionHtml} />}
          <Quality data={loaderData} />
          {!bench.elsewhere && (
            <Photographs
              project={project.publicId}
              of={{ bench: bench.publicId }}
              photographs={photographs}
              mayEdit={may.edit}
              what="the bench with its cables"
            />
          )}
          {!bench.elsewhere && (
            <ThreadSection
              projectId={project.publicId}
              place={{ bench: bench.publicId }}
              thread={loaderData.thread}
              mayWrite={may.write}
            />
          )}
        </div>
        <aside className="grid gap-8 content-start min-w-0" aria-label="What the bench is">
          <References data={loaderData} fault={actionData?.fault ?? null} />
          <Parts data={loaderData} />
          <Versions data={loaderData} />
          <TakenWith data={loaderData} />
        </aside>
      </div>
    </article>
  );
}
