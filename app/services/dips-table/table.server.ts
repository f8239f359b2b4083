import * as table from "~/db/dip-table.server";
import * as projects from "~/db/projects.server";
import { type BandOfDip, bandOf, type ProjectBands, projectBands, stretchesOf } from "./bands.ts";
import { DIPS_CSV_HEAD, dipCsvLine } from "./csv.ts";
import { type Place, startBehind } from "./place.ts";

/** What is asked of the table; `band` is a choice of `bandChoices`. */
export interface DipsAsked extends Omit<table.DipFilter, "projectId" | "stretches"> {
  band: string;
}

export interface ListedDip extends Omit<table.TableRow, "id"> {
  band: BandOfDip;
}

/** A page of the project's dips, from 1; how many there are in all pages; and what can be chosen. */
export async function dipsPage(
  project: Pick<projects.Project, "id" | "ituRegion">,
  asked: DipsAsked,
  order: table.DipOrder,
  page: number,
) {
  const bands = await bandsOf(project);
  const filter = filterOf(project, asked, bands);
  const [found, all, sweeps] = await Promise.all([
    table.findAll(filter, order, { limit: PAGE_ROWS, offset: (page - 1) * PAGE_ROWS }),
    table.countAll(filter),
    table.findSweepsWithDips(project.id),
  ]);
  return {
    bands,
    sweeps,
    all,
    more: found.more,
    rows: found.rows.map(
      ({ id: _, ...row }): ListedDip => ({ ...row, band: bandOf(row.numbers.frequencyHz, bands) }),
    ),
  };
}

/** The page behind a place in their order, null for the first; nothing is told twice or left out by what comes meanwhile. */
export async function dipsBehind(
  project: Pick<projects.Project, "id" | "ituRegion">,
  asked: DipsAsked,
  order: table.DipOrder,
  place: Place | null,
) {
  const bands = await bandsOf(project);
  const ids = await table.findIds(filterOf(project, asked, bands), order);
  const from = startBehind(ids, place);
  const page = ids.slice(from, from + PAGE_ROWS);
  const rows = await table.findAllByIds(page);
  const to = from + page.length;
  return {
    all: ids.length,
    rows: rows.map(({ id: _, ...row }) => ({ ...row, band: bandOf(row.numbers.frequencyHz, bands) })),
    next: to < ids.length ? { id: ids[to - 1], count: to } : null,
  };
}

/** The CSV of all pages, piece by piece; each piece is fetched when the one before it is gone. */
export async function* dipsCsv(
  project: Pick<projects.Project, "id" | "ituRegion">,
  asked: DipsAsked,
  order: table.DipOrder,
): AsyncGenerator<string> {
  const bands = await bandsOf(project);
  const ids = await table.findIds(filterOf(project, asked, bands), order);
  yield DIPS_CSV_HEAD;
  for (let i = 0; i < ids.length; i += PIECE_ROWS) {
    const rows = await table.findAllByIds(ids.slice(i, i + PIECE_ROWS));
    yield rows.map((row) => dipCsvLine(row, bands)).join("");
  }
}

/** The bands that its dips can lie in. */
export async function bandsOf({
  id,
  ituRegion,
}: Pick<projects.Project, "id" | "ituRegion">): Promise<ProjectBands> {
  return projectBands(ituRegion, await projects.findDesignBands(id));
}

function filterOf(project: { id: number }, asked: DipsAsked, bands: ProjectBands): table.DipFilter {
  const { band, ...rest } = asked;
  return { ...rest, projectId: project.id, stretches: stretchesOf(band, bands) };
}

/** CONTRACTS: a page of a list. */
export const PAGE_ROWS = 100;
const PIECE_ROWS = 500;
