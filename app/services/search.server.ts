import * as search from "~/db/search.server";
import * as searchDips from "~/db/search-dips.server";
import * as published from "~/db/search-published.server";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { plainText } from "./markdown.server.ts";
import { MAX_NOTE_CHARACTERS } from "./note-limits.ts";
import { placeWords } from "./note-places.ts";
import { plateWords } from "./note-words.ts";
import { type DipRange, searchWords } from "./search-question.ts";
import { type SnippetPart, snippet } from "./snippets.ts";

export const RESULT_KINDS = [
  "dips",
  "notes",
  "sweeps",
  "steps",
  "trails",
  "plates",
  "write-ups",
  "antennas",
  "projects",
  "people",
] as const;
export type ResultKind = (typeof RESULT_KINDS)[number];

export interface Result {
  to: string;
  title: string;
  /** Where it is: the project, and in it. */
  place: string;
  snippet: SnippetPart[];
  at: Date;
}

export interface ResultGroup {
  kind: ResultKind;
  results: Result[];
  nextCursor: string | null;
}

export interface Ask {
  userId: number | null;
  words: string;
  dips: DipRange | null;
  /** One kind alone, a page at a time; null for the first few of each. */
  only: ResultKind | null;
  cursor?: string;
}

/** What there is to be found for this person, kinds without a result left out. Numbers are asked of dips alone. */
export async function find(ask: Ask): Promise<ResultGroup[]> {
  const words = searchWords(ask.words);
  if (words.length === 0 && !ask.dips) return [];
  const kinds = ask.dips ? (["dips"] as const) : RESULT_KINDS;
  const asked = kinds.filter((kind) => ask.only === null || kind === ask.only);
  const about = {
    userId: ask.userId,
    words,
    limit: ask.only || ask.dips ? A_PAGE : A_FEW,
    cursor: ask.cursor,
  };
  const groups = await Promise.all(
    asked.map(async (kind) => ({ kind, ...(await FINDERS[kind](about, ask.dips)) })),
  );
  return groups.filter(({ results }) => results.length > 0);
}

type Found = Pick<ResultGroup, "results" | "nextCursor">;

const FINDERS: Record<ResultKind, (about: search.Search, range: DipRange | null) => Promise<Found>> = {
  dips: async (about, range) => {
    const page = await searchDips.findDips({ ...about, ...(range ?? ANY_DIP), inTitles: range !== null });
    return shape(page, ({ publicId, project, numbers, verdict, verdictText, sweepTitle, at }) => ({
      to: `/projects/${project.publicId}/dips/${publicId}`,
      title: `${formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz)}, SWR ${formatSwr(numbers.minimumSwr, numbers.minimumSwrLow, numbers.minimumSwrHigh)}`,
      place: `${project.title}: ${sweepTitle}`,
      snippet: snippet(verdictText ? `${verdict}: ${verdictText}` : verdict, about.words),
      at,
    }));
  },
  notes: async (about) =>
    shape(await search.findNotes(about), ({ publicId, project, body, author, place, at }) => ({
      to: `/projects/${project.publicId}/notes/${publicId}`,
      title: `${author ?? "former member"} on ${placeWords(place)}`,
      place: project.title,
      snippet: snippet(plainText(body, MAX_NOTE_CHARACTERS), about.words, NOTE_SNIPPET),
      at,
    })),
  sweeps: async (about) =>
    shape(await search.findSweeps(about), ({ publicId, project, title, fileName, read, at }) => ({
      to: `/projects/${project.publicId}/sweeps/${publicId}${read ? "" : "/reading"}`,
      title,
      place: project.title,
      snippet: snippet(fileName, about.words),
      at,
    })),
  steps: async (about) =>
    shape(await search.findSteps(about), ({ publicId, project, title, body, at }) => ({
      to: `/projects/${project.publicId}/steps/${publicId}`,
      title,
      place: project.title,
      snippet: snippet(plainText(body, MAX_NOTE_CHARACTERS), about.words),
      at,
    })),
  trails: async (about) =>
    shape(await search.findTrails(about), ({ publicId, project, name, frequencyHz, verdictText, at }) => ({
      to: `/projects/${project.publicId}/trails/${publicId}`,
      title: name || `The trail at ${formatFrequency(frequencyHz, null)}`,
      place: project.title,
      snippet: snippet(verdictText, about.words),
      at,
    })),
  plates: async (about) =>
    shape(await published.findPlates(about), (plate) => ({
      to: `/plates/${plate.publicId}`,
      title: plateWords(plate),
      place: plate.project.title,
      snippet: snippet(plainText(plate.caption, MAX_NOTE_CHARACTERS), about.words),
      at: plate.at,
    })),
  "write-ups": async (about) =>
    shape(await published.findWriteUps(about), ({ publicId, project, title, body, at }) => ({
      to: `/write-ups/${publicId}`,
      title,
      place: project.title,
      snippet: snippet(plainText(body, body.length), about.words, NOTE_SNIPPET),
      at,
    })),
  antennas: async (about) =>
    shape(await search.findAntennas(about), ({ project, words, at }) => ({
      to: `/projects/${project.publicId}/antenna`,
      title: `The antenna of ${project.title}`,
      place: project.title,
      snippet: snippet(fromJson(words), about.words),
      at,
    })),
  projects: async (about) =>
    shape(await search.findProjects(about), ({ project, summary, at }) => ({
      to: `/projects/${project.publicId}`,
      title: project.title,
      place: "Project",
      snippet: snippet(plainText(summary, MAX_NOTE_CHARACTERS), about.words),
      at,
    })),
  people: async (about) =>
    shape(await search.findPeople(about), ({ project, name, userName, at }) => ({
      to: `/projects/${project.publicId}/members`,
      title: name,
      place: `Member of ${project.title}`,
      snippet: snippet(userName, about.words),
      at,
    })),
};

function shape<Row>(page: { rows: Row[]; nextCursor: string | null }, draw: (row: Row) => Result): Found {
  return { results: page.rows.map(draw), nextCursor: page.nextCursor };
}

/** Texts as they stand in the lists that the database takes out of JSON: `["a", "b"]`. */
function fromJson(text: string): string {
  const strings = [...text.matchAll(/"((?:[^"\\]|\\.)*)"/g)].map(([whole]) => JSON.parse(whole) as string);
  const rest = text.replace(/\[(?:"(?:[^"\\]|\\.)*"|[^\]"])*\]|"(?:[^"\\]|\\.)*"/g, " ");
  return [...strings, rest.replace(/\bnull\b/g, " ")]
    .map((piece) => piece.trim())
    .filter(Boolean)
    .join(" · ");
}

const ANY_DIP: DipRange = { fromHz: null, toHz: null, swrUnder: null, swrOver: null, verdict: null };
const A_FEW = 5;
const A_PAGE = 30;
const NOTE_SNIPPET = 200;
