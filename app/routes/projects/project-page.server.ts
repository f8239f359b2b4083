import type { ProjectAccess } from "~/auth/require.server";
import * as dips from "~/db/dips.server";
import * as notes from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import * as story from "~/db/story.server";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { plainText, renderNote } from "~/services/markdown.server";
import { placeWords } from "~/services/note-places";
import { listThread } from "~/services/note-thread.server";
import { loadStripMap } from "./strip-map.server.ts";
import { loadTrailList } from "./trail-list.server.ts";

/** The project's story: its strip map, its trails, what is open and what was said last. */
export async function loadProjectPage(access: ProjectAccess, search: URLSearchParams) {
  const { project, may } = access;
  const [map, trails, counts, unread, open, openCount, latest, members, thread] = await Promise.all([
    loadStripMap(project, search),
    loadTrailList(project),
    story.countStory(project.id),
    story.findUnread(project.id),
    dips.findOpenByProject(project.id, 8),
    dips.countOpenByProject(project.id),
    notes.findLatestByProject(project.id, 6),
    projects.findMembers(project.id),
    listThread({ projectId: project.id, sweepId: null, dipId: null }, access),
  ]);
  return {
    project: { publicId: project.publicId, title: project.title },
    summaryHtml: project.summary ? renderNote(project.summary) : null,
    may: { add: may("sweep.add"), write: may("note.write"), step: may("step.edit") },
    map,
    trails,
    counts: { ...counts, open: openCount },
    unread,
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
      about: placeWords(place),
    })),
    members: members.map(({ name, userName, role }) => ({ name, userName, role })),
    thread,
  };
}
export type ProjectPageData = Awaited<ReturnType<typeof loadProjectPage>>;
