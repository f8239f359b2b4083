import { onPage } from "~/charts/on-page";
import type { Project } from "~/db/projects.server";
import type { PlateChoices } from "~/services/plates/choices";
import { compose } from "~/services/plates/compose.server";
import { drawFigure } from "~/services/plates/draw.server";
import type { PlateRecord, UnnumberedRecord } from "~/services/plates/record";
import { type PlateSubject, subjectOf } from "~/services/plates/subject";
import { errorsOf, type PlateErrors, plateSchema, textsOfForm } from "./plates.schema";

/** How a plate would look and what it would say, if it were frozen now. Nothing is written. */
export interface PlatePreview {
  /** Complete SVG in the page's own colours. */
  svg: string;
  tables: PlateRecord["tables"];
  /** What can be called something else. */
  labelled: Labelled[];
  /** False for a bench, which has no choice of curves. */
  curves: boolean;
}

export interface Labelled {
  id: string;
  is: string;
}

export interface PreviewAnswer {
  preview: PlatePreview | null;
  /** Why there is none. */
  problem: string | null;
  errors: PlateErrors;
}

/** The same as the form stands. */
export async function previewOfForm(project: Project, form: FormData): Promise<PreviewAnswer> {
  const subject = subjectOf(String(form.get("from")));
  if (!subject) return { preview: null, problem: "The form does not say what the plate is of.", errors: {} };
  const parsed = plateSchema.safeParse(textsOfForm(form));
  if (!parsed.success) return { preview: null, problem: null, errors: errorsOf(parsed.error) };
  const preview = await previewPlate(project, subject, parsed.data);
  if ("problem" in preview) return { preview: null, problem: preview.problem, errors: {} };
  return { preview, problem: null, errors: {} };
}

export async function previewPlate(
  project: Project,
  subject: PlateSubject,
  choices: PlateChoices,
): Promise<PlatePreview | { problem: string }> {
  const composed = await compose(project, subject, choices);
  if ("problem" in composed) return composed;
  const { record } = composed;
  return {
    svg: onPage(drawFigure(record, { theme: "light" })),
    tables: record.tables,
    labelled: labelledOf(record),
    curves: record.figure.quantity !== "decibels",
  };
}

/** Sweeps by their titles, trails by their names; dips are called by their numbers. */
function labelledOf({ figure, sources }: UnnumberedRecord): Labelled[] {
  const titles = new Map(sources.map(({ sweep, title }) => [sweep, title]));
  const traces = figure.traces.map(({ id, label }) => ({ id, is: titles.get(id) ?? label }));
  const trails = figure.trails.map(({ id, label }) => ({ id, is: label }));
  return [...traces, ...trails].filter(({ is }) => is !== "");
}
