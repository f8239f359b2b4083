import { mayInProject, type ProjectRole } from "~/auth/permissions";
import { newPublicId } from "~/db/ids.server";
import type * as noteRows from "~/db/notes.server";
import * as people from "~/db/people.server";
import { type WriteNote, writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";

/** Two people and a project, new before each test: `beforeEach(begin)`. */
export let ada: { id: number };
export let bram: { id: number };
export let project: { id: number };
export let place: noteRows.NotePlace;

export async function begin(): Promise<void> {
  const person = async (name: string) => ({
    id: await people.insert({ userName: `${name}-${newPublicId()}`, name, email: null }),
  });
  ada = await person("Ada");
  bram = await person("Bram");
  project = await newProject();
  place = { projectId: project.id, sweepId: null, dipId: null };
}

export function newProject() {
  return createProject({ title: "Reeds", summary: "", visibility: "private", ituRegion: null }, ada.id);
}

export function write(author: { id: number }, body: string, more: Partial<WriteNote> = {}) {
  return writeNote({ project, author, place, body, ...more });
}

export function as(person: { id: number } | null, role: ProjectRole | null) {
  return { person, may: (action: Parameters<typeof mayInProject>[1]) => mayInProject(role, action) };
}

export const asAda = () => as(ada, "owner");

export function text(html: string): string {
  return html.replace(/<[^>]*>/g, "").trim();
}
