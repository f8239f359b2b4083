import { LRUCache } from "lru-cache";
import type { ProjectAccess } from "~/auth/require.server";
import * as writeUps from "~/db/write-ups.server";
import { type Article, plainText, renderArticle } from "../markdown.server.ts";
import { NO_LINKS, type NoteLinks, subjectsIn } from "../markdown-links.ts";
import { loadLinks } from "../note-links.server.ts";
import { type FigurePlace, figureDrawer, PLATE_ADDRESS } from "./figure-html.ts";
import { type Frozen, type FrozenFigure, type PlateState, parseFrozen, platesOf } from "./frozen.ts";

export interface Publication extends writeUps.FoundVersion {
  writeUp: writeUps.WriteUpRow;
  project: writeUps.FoundWriteUp["project"];
  /** Who began it. */
  writer: string | null;
  frozen: Frozen;
}

export type Sought =
  | { kind: "shown"; publication: Publication }
  | { kind: "taken-back"; at: Date; project: writeUps.FoundWriteUp["project"] }
  | { kind: "absent" };

/** A published write-up for anyone with its address: the version that was asked for, else the one that counts. */
export async function seek(publicId: string | undefined, wanted: string | null): Promise<Sought> {
  const found = await writeUps.findByPublicId(publicId ?? "");
  if (!found) return { kind: "absent" };
  const { writeUp, project } = found;
  if (writeUp.publishedNumber === null) {
    return writeUp.takenBackAt
      ? { kind: "taken-back", at: writeUp.takenBackAt, project }
      : { kind: "absent" };
  }
  const number = wanted === null ? writeUp.publishedNumber : Number(/^[1-9]\d{0,5}$/.exec(wanted)?.[0]);
  const version = Number.isNaN(number) ? undefined : await writeUps.findVersion(writeUp.id, number);
  if (!version) return { kind: "absent" };
  const frozen = parseFrozen(version.version.frozen);
  return { kind: "shown", publication: { ...version, writeUp, project, writer: found.by, frozen } };
}

/** Only these two differ in what a page of it links to; the text and the figures are the same for all. */
export type Reader = Pick<ProjectAccess, "person" | "may"> | null;

/** The text with its frozen figures, for a page of this server. `reader`: who may open the project, null for anybody else. */
export async function drawPage(publication: Publication, reader: Reader): Promise<Article> {
  const plates = await plateStates(publication.frozen.figures);
  const withdrawn = [...plates].flatMap(([id, state]) => (state.withdrawnAt ? [id] : []));
  const key = `${publication.version.id} ${reader ? "in" : "out"} ${withdrawn.join(" ")}`;
  const kept = pages.get(key);
  if (kept) return kept;
  const place: FigurePlace = {
    figures: publication.frozen.figures,
    plates,
    plateSource: PLATE_ADDRESS,
    linkTo: (figure) => (reader || isPlate(figure) ? figure.path : null),
  };
  const links = await linksFor(publication, reader);
  const article = renderArticle(publication.version.body, links, figureDrawer(place));
  pages.set(key, article);
  return article;
}

/** The same for a text that leaves this server: addresses are whole, and nothing but plates is linked to. */
export function drawElsewhere(
  publication: Publication,
  origin: string,
  place: Pick<FigurePlace, "plates" | "plateSource">,
): Article {
  const linkTo = (figure: FrozenFigure) => (isPlate(figure) ? `${origin}${figure.path}` : null);
  const all: FigurePlace = { figures: publication.frozen.figures, linkTo, ...place };
  return renderArticle(publication.version.body, plateLinks(publication, origin), figureDrawer(all));
}

export async function plateStates(figures: readonly FrozenFigure[]): Promise<Map<string, PlateState>> {
  const rows = await writeUps.findPlates(platesOf(figures));
  return new Map(rows.map(({ publicId, ...state }) => [publicId, state]));
}

/** Its beginning in a line, for feeds and previews elsewhere. */
export function summaryOf(body: string): string {
  const text = body.replace(/^ {0,3}(?:#{1,6} .*|!\[.*)$/gm, "").replace(/\[\^[^\]\n]+\]:?/g, "");
  return plainText(text.slice(0, SUMMARY_FROM), SUMMARY);
}

async function linksFor(publication: Publication, reader: Reader): Promise<NoteLinks> {
  if (!reader) return plateLinks(publication, "");
  const { references } = await loadLinks(publication.project.id, [publication.version.body], reader);
  // Only where they are: the numbers of now would make another text of it.
  const places = [...references].map(([subject, { path }]) => [subject, { path, now: null }] as const);
  return { ...NO_LINKS, references: new Map(places), filesStay: true };
}

/** Plates are for everybody; whom and what else the text names is of the project. */
function plateLinks({ version }: Publication, origin: string): NoteLinks {
  const named = subjectsIn(version.body).filter((subject) => subject.startsWith("plate:"));
  const places = named.map((one) => [one, { path: `${origin}/plates/${one.slice(6)}`, now: null }] as const);
  return { ...NO_LINKS, references: new Map(places), filesStay: true };
}

function isPlate({ subject }: FrozenFigure): boolean {
  return subject.startsWith("plate:");
}

const SUMMARY = 300;
/** Enough for a summary, little enough to be parsed at once. */
const SUMMARY_FROM = 4000;

/** What was drawn last; a version never changes, and what it links to may be gone a few minutes later. */
const pages = new LRUCache<string, Article>({
  maxSize: 20_000_000,
  sizeCalculation: ({ html }) => html.length + 1,
  ttl: 5 * 60 * 1000,
});
