import { data, redirect } from "react-router";
import type { ProjectAccess } from "~/auth/require.server";
import { newPublicId } from "~/db/ids.server";
import * as plates from "~/db/plates.server";
import { notFound } from "~/errors";
import { parseView } from "~/routes/sweeps/sweeps.schema";
import { defaultsFor, type PlateChoices } from "~/services/plates/choices";
import { propose } from "~/services/plates/compose.server";
import { parseRecord } from "~/services/plates/record";
import { MOST_COMPARED, type PlateSubject, subjectOf, subjectText } from "~/services/plates/subject";
import { type PlateTexts, textsOfChoices } from "./plates.schema";
import { type PlatePreview, previewPlate } from "./preview-plate.server";

/** The version that a new one is to mend. */
export interface Mended {
  publicId: string;
  number: number;
  version: number;
  title: string;
}

export interface PlateDraft {
  /** `subjectText` of what it is of. */
  from: string;
  mends: Mended | null;
  texts: PlateTexts;
  preview: PlatePreview | null;
  /** Why there is no preview. */
  problem: string | null;
  /** Goes along with the form: sent twice, it freezes one plate. */
  draw: string;
}

/** The form as an address opens it; null where the address does not say of what. */
export async function openDraft(
  { project }: ProjectAccess,
  search: URLSearchParams,
): Promise<PlateDraft | null> {
  const mended = await findMended(project.id, search.get("mends"));
  const from = mended ? mended.record.subject : askedFor(search);
  if (from === null) return null;
  const subject = subjectOf(from);
  if (!subject) throw data("The address does not say what the plate is to be of.", 400);
  const choices = mended ? mended.record.choices : await proposed(project, subject, search);
  if ("problem" in choices) return { ...blank(from), problem: choices.problem };
  const preview = await previewPlate(project, subject, choices);
  const failed = "problem" in preview;
  return {
    ...blank(subjectText(subject)),
    mends: mended?.shown ?? null,
    texts: textsOfChoices(choices),
    preview: failed ? null : preview,
    problem: failed ? preview.problem : null,
  };
}

/** The newest version of the plate that an address names, with what it was made of. */
export async function findMended(projectId: number, publicId: string | null) {
  if (!publicId) return null;
  const found = await plates.findByPublicId(publicId);
  if (!found || found.projectId !== projectId) throw notFound("plate");
  const [newest] = (await plates.findVersions(found)).sort((a, b) => b.version - a.version);
  if (newest.publicId !== publicId) throw redirect(`?mends=${newest.publicId}`);
  const { number, version, title } = found;
  return { plate: found, record: parseRecord(found.record), shown: { publicId, number, version, title } };
}

/** `?from=…`, or the sweeps that were ticked. */
function askedFor(search: URLSearchParams): string | null {
  const ticked = search.getAll("sweep");
  if (ticked.length === 1) return `sweep:${ticked[0]}`;
  if (ticked.length > 1) return `compare:${ticked.slice(0, MOST_COMPARED).join(",")}`;
  return search.get("from");
}

async function proposed(
  project: ProjectAccess["project"],
  subject: PlateSubject,
  search: URLSearchParams,
): Promise<PlateChoices | { problem: string }> {
  const choices = await propose(project, subject);
  if ("problem" in choices) return choices;
  const view = parseView(
    new URLSearchParams({
      view: search.get("view") ?? "",
      from: search.get("low") ?? "",
      to: search.get("high") ?? "",
    }),
  );
  const axis = search.get("axis");
  return {
    ...choices,
    fromHz: view.fromHz,
    toHz: view.toHz,
    quantity: view.quantity === "swr" ? "swr" : choices.quantity,
    scale: axis === "log" || axis === "linear" ? axis : choices.scale,
  };
}

function blank(from: string): PlateDraft {
  return {
    from,
    mends: null,
    texts: textsOfChoices(defaultsFor({ title: "" })),
    preview: null,
    problem: null,
    draw: newPublicId(),
  };
}
