import { requireProject } from "~/auth/require.server";
import type { Suggestion } from "~/components/notes/Suggestions";
import * as subjects from "~/db/note-subjects.server";
import { dipWords, plateWords, stepWords, sweepWords } from "~/services/note-words";
import type { Route } from "./+types/suggest";

/** Whom (`?of=people`) or what (`?of=things`) a note of this project can name, by the first letters or digits (`&q=`). */
export async function loader(args: Route.LoaderArgs): Promise<{ q: string; suggestions: Suggestion[] }> {
  const { project } = await requireProject(args, "note.write");
  const query = new URL(args.request.url).searchParams;
  const q = (query.get("q") ?? "").trim().slice(0, MOST_CHARACTERS);
  if (query.get("of") === "people") {
    const people = await subjects.searchPeople(project.id, q);
    return {
      q,
      suggestions: people.map(({ name, userName }) => ({
        insert: `@${userName}`,
        label: name,
        detail: `@${userName}`,
      })),
    };
  }
  const [dips, sweeps, steps, plates] = await Promise.all([
    subjects.searchDips(project.id, q),
    subjects.searchSweeps(project.id, q),
    subjects.searchSteps(project.id, q),
    subjects.searchPlates(project.id, q),
  ]);
  const suggestion = (kind: string, { publicId }: { publicId: string }, label: string): Suggestion => ({
    insert: `#${kind}:${publicId}`,
    label,
    detail: kind,
  });
  return {
    q,
    suggestions: [
      ...dips.map((one) => suggestion("dip", one, dipWords(one))),
      ...sweeps.map((one) => suggestion("sweep", one, sweepWords(one))),
      ...steps.map((one) => suggestion("step", one, stepWords(one))),
      ...plates.map((one) => suggestion("plate", one, plateWords(one))),
    ].slice(0, MOST_SHOWN),
  };
}

const MOST_CHARACTERS = 60;
const MOST_SHOWN = 12;
