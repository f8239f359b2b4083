import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Profile } from "~/charts/Profile";
import { Thread } from "~/components/notes/Thread";
import { LinkButton } from "~/components/ui/Button";
import { DateTime, RelativeTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Markdown } from "~/components/ui/Markdown";
import { Tag, VerdictTag } from "~/components/ui/Tag";
import * as dips from "~/db/dips.server";
import * as notes from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { plainText, renderNote } from "~/services/markdown.server";
import { listThread } from "~/services/notes.server";
import { listSweeps } from "~/services/sweep-summaries.server";
import type { Route } from "./+types/project";
import { SharedAxis } from "./components/SharedAxis";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { project, may } = access;
  const [page, sweepCount, open, openCount, latest, members, thread] = await Promise.all([
    listSweeps(project.id, { limit: 12 }),
    sweeps.countByProject(project.id),
    dips.findOpenByProject(project.id, 8),
    dips.countOpenByProject(project.id),
    notes.findLatestByProject(project.id, 6),
    projects.findMembers(project.id),
    listThread({ projectId: project.id, sweepId: null, dipId: null }, access),
  ]);
  return {
    project: { publicId: project.publicId, title: project.title },
    summaryHtml: project.summary ? renderNote(project.summary) : null,
    mayAdd: may("sweep.add"),
    mayWrite: may("note.write"),
    sweeps: page.rows,
    sweepCount,
    openCount,
    open: open.map((dip) => ({
      publicId: dip.publicId,
      frequency: formatFrequency(dip.frequencyHz, dip.numbers.frequencyUncertaintyHz),
      swr: formatSwr(dip.numbers.minimumSwr, dip.numbers.minimumSwrLow, dip.numbers.minimumSwrHigh),
      verdict: dip.verdict,
      verdictText: dip.verdictText,
      sweepTitle: dip.sweepTitle,
      noteCount: dip.noteCount,
    })),
    latest: latest.map(({ note, author, ...place }) => ({
      publicId: note.publicId,
      line: plainText(note.body, 140),
      author: author?.name ?? "former member",
      at: note.createdAt,
      about: place.dipFrequencyHz
        ? `${formatFrequency(place.dipFrequencyHz, null)}, ${place.sweepTitle}`
        : (place.sweepTitle ?? "the project"),
    })),
    members: members.map(({ name, userName, role }) => ({ name, userName, role })),
    thread,
  };
}

export const meta: Route.MetaFunction = ({ data }) => [
  { title: `${data?.project.title ?? "Project"} · Swale` },
];

export default function Project({ loaderData }: Route.ComponentProps) {
  const { project, summaryHtml, thread, mayWrite } = loaderData;
  return (
    <div className="project-page">
      <div className="grid gap-8 content-start min-w-0">
        {summaryHtml && <Markdown html={summaryHtml} />}
        <Strips data={loaderData} />
        <section aria-labelledby="project-notes" className="grid gap-3">
          <h2 id="project-notes">Notes on the project</h2>
          <Thread projectId={project.publicId} place={{}} thread={thread} mayWrite={mayWrite} />
        </section>
      </div>
      <aside className="grid gap-8 content-start min-w-0" aria-label="What goes on">
        <OpenDips data={loaderData} />
        <LatestNotes data={loaderData} />
        <Members data={loaderData} />
      </aside>
    </div>
  );
}

type Data = Route.ComponentProps["loaderData"];

/** The sweeps, newest first, each as a strip of the same country. */
function Strips({ data }: { data: Data }) {
  const base = `/projects/${data.project.publicId}/sweeps`;
  const axis = sharedAxis(data.sweeps);
  if (data.sweeps.length === 0) {
    return (
      <EmptyState
        drawing="sweeps"
        title="No sweeps yet"
        action={data.mayAdd && <LinkButton to={`${base}/new`}>Add the first sweep</LinkButton>}
      >
        Drop in a text or Touchstone file and read its dips.
      </EmptyState>
    );
  }
  return (
    <section aria-labelledby="project-sweeps" className="grid gap-3">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h2 id="project-sweeps">Sweeps, newest first</h2>
        {data.mayAdd && (
          <LinkButton to={`${base}/new`} icon="add" size="small">
            Add sweeps
          </LinkButton>
        )}
      </div>
      <ol className="strips">
        {data.sweeps.map((sweep) => (
          <li key={sweep.publicId} className="strip">
            <div className="strip-words">
              <Link to={sweep.unread ? `${base}/${sweep.publicId}/reading` : `${base}/${sweep.publicId}`}>
                {sweep.title}
              </Link>
              <p className="text-small soft">
                {sweep.takenAt ? <DateTime at={sweep.takenAt} dateOnly /> : "date not said"}
                {" · "}
                {sweep.unread ? "not read yet" : countOf(sweep.dips.length, "dip")}
                {sweep.noteCount > 0 && ` · ${countOf(sweep.noteCount, "note")}`}
              </p>
              {sweep.openDips > 0 && <p className="text-small text-clay">{sweep.openDips} unsettled</p>}
            </div>
            <div className="strip-land">
              {sweep.profile ? (
                <Profile {...sweep.profile} heightPx={72} fromHz={axis.fromHz} toHz={axis.toHz} scale="log" />
              ) : (
                <Tag tone="clay">to be read</Tag>
              )}
            </div>
          </li>
        ))}
        {axis.fromHz < axis.toHz && (
          <li className="strip" aria-hidden="true">
            <div />
            <SharedAxis {...axis} />
          </li>
        )}
      </ol>
      {data.sweepCount > data.sweeps.length && (
        <p>
          <Link to={base}>All {data.sweepCount} sweeps</Link>
        </p>
      )}
    </section>
  );
}

function OpenDips({ data }: { data: Data }) {
  return (
    <section aria-labelledby="open-dips" className="grid gap-3">
      <h2 id="open-dips">Unsettled dips</h2>
      {data.open.length === 0 ? (
        <p className="soft">
          {data.sweeps.length === 0 ? "None: no sweep was taken yet." : "None in the newest sweep."}
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
      {data.openCount > data.open.length && (
        <p className="text-small">
          <Link to={`/projects/${data.project.publicId}/sweeps?only=open`}>
            {data.openCount - data.open.length} more in all sweeps
          </Link>
        </p>
      )}
    </section>
  );
}

function LatestNotes({ data }: { data: Data }) {
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

function Members({ data }: { data: Data }) {
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

function sharedAxis(list: { startHz: number | null; stopHz: number | null }[]) {
  const starts = list.flatMap((sweep) => (sweep.startHz === null ? [] : [sweep.startHz]));
  const stops = list.flatMap((sweep) => (sweep.stopHz === null ? [] : [sweep.stopHz]));
  return { fromHz: Math.min(...starts), toHz: Math.max(...stops) };
}

function countOf(n: number, what: string): string {
  return n === 1 ? `1 ${what}` : `${n} ${what}s`;
}
