import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Thread } from "~/components/notes/Thread";
import { RelativeTime } from "~/components/ui/DateTime";
import { Markdown } from "~/components/ui/Markdown";
import { VerdictTag } from "~/components/ui/Tag";
import { SinceLast } from "~/routes/activity/components/SinceLast";
import { sinceLast } from "~/services/activity.server";
import type { Route } from "./+types/project";
import { StripSection } from "./components/strip/StripSection.tsx";
import { TrailTable } from "./components/TrailTable.tsx";
import { loadProjectPage, type ProjectPageData } from "./project-page.server.ts";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { project, person, membership } = access;
  const [page, since] = await Promise.all([
    loadProjectPage(access, new URL(args.request.url).searchParams),
    person && membership ? sinceLast(project, person.id) : null,
  ]);
  return { ...page, since };
}

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `${data?.project.title ?? "Project"} · Swale` },
];

export default function Project({ loaderData }: Route.ComponentProps) {
  const { project, summaryHtml, thread, may, map } = loaderData;
  return (
    <div className="grid gap-10">
      {loaderData.since && <SinceLast projectId={project.publicId} since={loaderData.since} />}
      {summaryHtml && <Markdown html={summaryHtml} />}
      <StripSection data={loaderData} />
      <div className="project-page">
        <div className="grid gap-10 content-start min-w-0">
          {map.sweeps.length > 0 && (
            <section aria-labelledby="trails" className="grid gap-3">
              <h2 id="trails">Trails</h2>
              <TrailTable data={loaderData} />
              <p className="text-small">
                <Link to={`/projects/${project.publicId}/dips`}>All dips as a table</Link>
              </p>
            </section>
          )}
          <section aria-labelledby="project-notes" className="grid gap-3">
            <h2 id="project-notes">Notes on the project</h2>
            <Thread projectId={project.publicId} place={{}} thread={thread} mayWrite={may.write} />
          </section>
        </div>
        <aside className="grid gap-8 content-start min-w-0" aria-label="What goes on">
          <OpenDips data={loaderData} />
          <LatestNotes data={loaderData} />
          <Members data={loaderData} />
        </aside>
      </div>
    </div>
  );
}

function OpenDips({ data }: { data: ProjectPageData }) {
  return (
    <section aria-labelledby="open-dips" className="grid gap-3">
      <h2 id="open-dips">Unsettled dips</h2>
      {data.open.length === 0 ? (
        <p className="soft">
          {data.map.sweeps.length === 0 ? "None: no sweep was taken yet." : "None in the newest sweep."}
        </p>
      ) : (
        <ul className="grid gap-2">
          {data.open.map((dip) => (
            <li key={dip.publicId} className="panel grid gap-1">
              <p className="flex flex-wrap items-baseline justify-between gap-2">
                <Link
                  to={`/projects/${data.project.publicId}/dips/${dip.publicId}`}
                  className="font-mono font-semibold"
                >
                  {dip.frequency}
                </Link>
                <VerdictTag verdict={dip.verdict} />
              </p>
              <p className="text-small">
                <span className="font-mono">SWR {dip.swr}</span>
                {dip.verdictText && ` · ${dip.verdictText}`}
              </p>
              <p className="text-small soft">
                {dip.sweepTitle} · {countOf(dip.noteCount, "note")}
              </p>
            </li>
          ))}
        </ul>
      )}
      {data.counts.open > data.open.length && (
        <p className="text-small">
          <Link to={`/projects/${data.project.publicId}/sweeps?only=open`}>
            {data.counts.open - data.open.length} more in all sweeps
          </Link>
        </p>
      )}
    </section>
  );
}

function LatestNotes({ data }: { data: ProjectPageData }) {
  return (
    <section aria-labelledby="latest-notes" className="grid gap-3">
      <h2 id="latest-notes">Latest notes</h2>
      {data.latest.length === 0 ? (
        <p className="soft">Nobody has written a note yet.</p>
      ) : (
        <ul className="grid gap-3">
          {data.latest.map((note) => (
            <li key={note.publicId} className="note-line">
              <Link to={`/projects/${data.project.publicId}/notes/${note.publicId}`}>{note.line}</Link>
              <p className="text-small soft">
                {note.author} on {note.about}, <RelativeTime at={note.at} />
              </p>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

function Members({ data }: { data: ProjectPageData }) {
  return (
    <section aria-labelledby="members" className="grid gap-3">
      <h2 id="members">Members</h2>
      <ul className="grid gap-1">
        {data.members.map((member) => (
          <li key={member.userName} className="flex flex-wrap justify-between gap-2">
            <span>{member.name}</span>
            <span className="text-small soft">{member.role}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}

function countOf(n: number, what: string): string {
  return n === 1 ? `1 ${what}` : `${n} ${what}s`;
}
