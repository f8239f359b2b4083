import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import "~/components/notes/notes.css";
import { DateTime } from "~/components/ui/DateTime";
import { Markdown } from "~/components/ui/Markdown";
import * as noteVersions from "~/db/note-versions.server";
import { renderNote } from "~/services/markdown.server";
import { loadLinks } from "~/services/note-links.server";
import type { Route } from "./+types/history";
import { requireNote } from "./require-note.server.ts";

export const meta: Route.MetaFunction = () => [{ title: "What a note said before · Swale" }];

/** What a note said before it was changed, for everybody who reads the note. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { project } = access;
  const { note, author } = await requireNote(project.id, args.params.note);
  const versions = await noteVersions.findAllByNote(note.id);
  const links = await loadLinks(project.id, [note.body, ...versions.map(({ body }) => body)], access);
  const last = versions[versions.length - 1];
  return {
    address: `/projects/${project.publicId}/notes/${note.publicId}`,
    author: author?.name ?? "A former member",
    now: { html: renderNote(note.body, links), from: last?.until ?? note.createdAt },
    before: versions
      .toReversed()
      .map(({ body, from, until }) => ({ html: renderNote(body, links), from, until })),
  };
}

export default function NoteHistory({ loaderData: { address, author, now, before } }: Route.ComponentProps) {
  return (
    <article className="grid gap-6 max-w-[72ch]">
      <header className="grid gap-1">
        <h1>What the note said before</h1>
        <p className="soft">
          A note by {author}. <Link to={address}>Back to where it stands</Link>
        </p>
      </header>
      <section aria-label="Now" className="note note-chosen">
        <p className="text-small soft">
          Now, since <DateTime at={now.from} />
        </p>
        <Markdown html={now.html} />
      </section>
      {before.length === 0 && <p className="soft">It was never changed: it says what it always said.</p>}
      {before.map(({ html, from, until }) => (
        <section key={String(from)} aria-label="Before" className="note">
          <p className="text-small soft">
            From <DateTime at={from} /> to <DateTime at={until} />
          </p>
          <Markdown html={html} />
        </section>
      ))}
    </article>
  );
}
