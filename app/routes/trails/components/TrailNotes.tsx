import { Link } from "react-router";
import { RelativeTime } from "~/components/ui/DateTime";
import { formatFrequency } from "~/measurement/units";
import type { TrailPageData } from "../trail-page.server";

/** What was said on the trail's dips, gathered. */
export function TrailNotes({ data: { notes, moreNotes, project, stops } }: { data: TrailPageData }) {
  const base = `/projects/${project.publicId}`;
  const newest = stops[stops.length - 1];
  return (
    <section aria-labelledby="trail-notes" className="grid gap-3">
      <h2 id="trail-notes">What was said on its dips</h2>
      {notes.length === 0 ? (
        <p className="soft">
          Nothing yet.{" "}
          {newest && (
            <Link to={`${base}/dips/${newest.publicId}`}>Write the first note on its newest dip</Link>
          )}
        </p>
      ) : (
        <ul className="grid gap-3">
          {notes.map((note) => (
            <li key={note.publicId} className="note-line">
              <Link to={`${base}/notes/${note.publicId}`}>{note.line}</Link>
              <p className="text-small soft">
                {note.author ?? "former member"} on{" "}
                <Link to={`${base}/dips/${note.dipPublicId}`}>{formatFrequency(note.frequencyHz)}</Link>,{" "}
                {note.sweepTitle}, <RelativeTime at={note.at} />
              </p>
            </li>
          ))}
        </ul>
      )}
      {moreNotes > 0 && <p className="text-small soft">{moreNotes} older ones stand with their dips.</p>}
    </section>
  );
}
