import { data, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { ThreadSection } from "~/components/notes/ThreadSection";
import { MakePlate } from "~/components/plates/MakePlate";
import { VerdictTag } from "~/components/ui/Tag";
import { refused } from "~/errors";
import type { Route } from "./+types/trail";
import { CorrectTrail } from "./components/CorrectTrail.tsx";
import { Expected } from "./components/Expected.tsx";
import { Happened } from "./components/Happened.tsx";
import { NameForm } from "./components/NameForm.tsx";
import { TrailChart } from "./components/TrailChart.tsx";
import { TrailNotes } from "./components/TrailNotes.tsx";
import { TrailVerdict } from "./components/TrailVerdict.tsx";
import { WayTable } from "./components/WayTable.tsx";
import { correctTrail } from "./correct-trail.server.ts";
import { loadTrailPage } from "./trail-page.server.ts";
import { trailForm } from "./trails.schema.ts";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  return loadTrailPage(access, args.params.trail);
}

/** Naming and correcting is for experimenters; verdicts by the same rules as a dip's. */
export async function action(args: Route.ActionArgs) {
  const form = await args.request.formData();
  const intent = String(form.get("intent"));
  const asks =
    intent === "propose"
      ? "verdict.propose"
      : ["settle", "reopen"].includes(intent)
        ? "verdict.settle"
        : "trail.correct";
  const access = await requireProject(args, asks);
  if (!access.person) throw refused("Sign in first. Nothing was changed.");
  const parsed = trailForm.safeParse({
    ...Object.fromEntries(form),
    evidence: form.getAll("evidence").map(String),
  });
  if (!parsed.success) {
    const errors = parsed.error.issues.map(({ message }) => message);
    return data({ intent, errors: [...errors, "Nothing was changed."] }, 400);
  }
  const stays = new URL(args.request.url).pathname.endsWith(".data");
  return correctTrail(access, access.person, args.params.trail, parsed.data, stays);
}

export const meta: Route.MetaFunction = ({ data }) => [{ title: `${data?.title ?? "Trail"} · Swale` }];

export default function TrailPage({ loaderData, actionData }: Route.ComponentProps) {
  const { project, trail, title, seen, stops, may } = loaderData;
  const errors = (intent: string) => (actionData?.intent === intent ? actionData.errors : []);
  return (
    <article className="grid gap-8">
      <header className="grid gap-2">
        <p className="text-small">
          <Link to={`/projects/${project.publicId}`}>Strip map</Link>
        </p>
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <h1>{title}</h1>
          <VerdictTag verdict={trail.verdict} />
          {stops.length > 0 && <MakePlate from={`trail:${trail.publicId}`} />}
        </div>
        <p className="soft">{seen}</p>
        {may.correct && <NameForm name={trail.name} errors={errors("name")} />}
      </header>
      {stops.length === 0 && (
        <p className="panel border-l-3 border-l-clay">
          No dip is on this trail any more: its sweeps were deleted, analysed anew, or its dips went to
          another trail. Its name and its verdict are kept. Join it with another trail to bring it back.
        </p>
      )}
      <TrailVerdict
        data={loaderData}
        errors={[...errors("propose"), ...errors("settle"), ...errors("reopen")]}
      />
      {stops.length > 0 && (
        <section aria-labelledby="way" className="grid gap-4">
          <h2 id="way">Along the way</h2>
          <TrailChart data={loaderData} />
          <WayTable data={loaderData} errors={errors("part")} />
          <Happened data={loaderData} />
          <Expected data={loaderData} />
        </section>
      )}
      <div className="grid gap-10 lg:grid-cols-2">
        <div className="grid gap-10 content-start min-w-0">
          <ThreadSection
            projectId={project.publicId}
            place={{ trail: trail.publicId }}
            thread={loaderData.thread}
            mayWrite={may.write}
          />
          <TrailNotes data={loaderData} />
        </div>
        <CorrectTrail
          data={loaderData}
          errors={[...errors("join"), ...errors("join-dip"), ...errors("take-back")]}
        />
      </div>
    </article>
  );
}
