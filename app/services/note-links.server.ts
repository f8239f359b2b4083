import type { ProjectAction } from "~/auth/permissions";
import * as attachments from "~/db/attachments.server";
import type { Queryable } from "~/db/client.server";
import type { NewReference } from "~/db/note-references.server";
import * as subjects from "~/db/note-subjects.server";
import { textsIn } from "./markdown.server.ts";
import { type NoteLinks, type ShownAttachment, type SubjectKind, subjectsIn } from "./markdown-links.ts";
import { asLabel, dipWords, plateWords, sizeWords, stepWords, sweepWords } from "./note-words.ts";

/** For whom a text is drawn, as far as it changes what is offered. */
export interface LinkReader {
  person: { id: number } | null;
  may: (action: ProjectAction) => boolean;
}

/** What is known now of everybody and everything that these texts name, of this project alone. */
export async function loadLinks(projectId: number, bodies: string[], reader: LinkReader): Promise<NoteLinks> {
  const named = [...new Set(bodies.flatMap(subjectsIn))];
  const [people, references, files] = await Promise.all([
    subjects.findPeople(projectId, { publicIds: idsOf(named, "person") }),
    findReferences(projectId, named),
    attachments.findShown(projectId, idsOf(named, "attachment"), reader.person?.id ?? null),
  ]);
  return {
    people: new Map(people.map(({ publicId, name }) => [`person:${publicId}`, name])),
    references,
    attachments: new Map(
      files.map(({ attachment, project }) => {
        const shown = shownAttachment(attachment, project, reader.may("sweep.add"));
        return [`attachment:${attachment.publicId}`, shown];
      }),
    ),
  };
}

export interface Expanded {
  body: string;
  references: NewReference[];
  /** Public ids of the members who are named. */
  mentioned: string[];
}

/**
 * A text as it is kept: `@user-name` of a member and `#dip:…` become links of our own with the words of now. References
 * that are kept from before (`before`) keep their words; what names nobody and nothing of this project stays as it is.
 */
export async function expandNote(
  projectId: number,
  written: string,
  before: readonly NewReference[] = [],
  tx?: Queryable,
): Promise<Expanded> {
  const said = textsIn(written).join("\n");
  const userNames = Array.from(said.matchAll(MENTION), ([, , userName]) => userName.toLowerCase());
  const short = Array.from(said.matchAll(SHORT), ([, , subject]) => subject);
  const linked = subjectsIn(written);
  const [people, known] = await Promise.all([
    subjects.findPeople(projectId, { userNames, publicIds: idsOf(linked, "person") }, tx),
    findReferences(projectId, [...short, ...linked], tx),
  ]);
  const byUserName = new Map(people.map((one) => [one.userName, one]));
  const names = new Map(people.map(({ publicId, name }) => [`person:${publicId}`, name]));
  const wordsOf = (subject: string) =>
    before.find((one) => `${one.kind}:${one.subject}` === subject)?.text ?? known.get(subject)?.now;
  const link = (subject: string, words: string) => `[${asLabel(words)}](${subject})`;
  const body = outsideCode(written, (text) =>
    text
      .replace(LINK, (all, subject: string) => {
        const name = names.get(subject);
        const words = name === undefined ? wordsOf(subject) : `@${name}`;
        return words === undefined ? all : link(subject, words);
      })
      .replace(MENTION, (all, space: string, userName: string) => {
        const person = byUserName.get(userName.toLowerCase());
        return person ? `${space}${link(`person:${person.publicId}`, `@${person.name}`)}` : all;
      })
      .replace(SHORT, (all, space: string, subject: string) => {
        const words = wordsOf(subject);
        return words === undefined ? all : `${space}${link(subject, words)}`;
      }),
  );
  const there = subjectsIn(body);
  return {
    body,
    references: there.flatMap((subject) => {
      const words = wordsOf(subject);
      const [kind, id] = subject.split(":") as [NewReference["kind"], string];
      return known.has(subject) && words !== undefined ? [{ kind, subject: id, text: words }] : [];
    }),
    mentioned: there.filter((subject) => names.has(subject)).map((subject) => subject.split(":")[1]),
  };
}

/** Public ids of the attachments that a text names. */
export function attachmentsIn(body: string): string[] {
  return idsOf(subjectsIn(body), "attachment");
}

function shownAttachment(
  { publicId, name, sizeBytes, width, height }: attachments.AttachmentRow,
  project: string,
  mayTakeIn: boolean,
): ShownAttachment {
  const path = `/projects/${project}/attachments/${publicId}`;
  const picture = width !== null && height !== null ? { width, height } : null;
  return {
    path,
    name,
    size: sizeWords(sizeBytes),
    picture,
    sweepPath: !picture && mayTakeIn ? `${path}/sweep` : null,
  };
}

async function findReferences(projectId: number, named: string[], tx?: Queryable) {
  const [dips, sweeps, steps, plates] = await Promise.all([
    subjects.findDips(projectId, idsOf(named, "dip"), tx),
    subjects.findSweeps(projectId, idsOf(named, "sweep"), tx),
    subjects.findSteps(projectId, idsOf(named, "step"), tx),
    subjects.findPlates(projectId, idsOf(named, "plate"), tx),
  ]);
  const page = (folder: string, { project, publicId }: { project: string; publicId: string }) =>
    `/projects/${project}/${folder}/${publicId}`;
  return new Map<string, { path: string; now: string }>([
    ...dips.map((one) => [`dip:${one.publicId}`, { path: page("dips", one), now: dipWords(one) }] as const),
    ...sweeps.map(
      (one) => [`sweep:${one.publicId}`, { path: page("sweeps", one), now: sweepWords(one) }] as const,
    ),
    ...steps.map(
      (one) => [`step:${one.publicId}`, { path: page("steps", one), now: stepWords(one) }] as const,
    ),
    ...plates.map(
      (one) => [`plate:${one.publicId}`, { path: `/plates/${one.publicId}`, now: plateWords(one) }] as const,
    ),
  ]);
}

function idsOf(named: string[], kind: SubjectKind): string[] {
  const own = named.filter((subject) => subject.startsWith(`${kind}:`));
  return [...new Set(own.map((subject) => subject.slice(kind.length + 1)))];
}

/** Fenced and inline code stays as it was written. */
function outsideCode(markdown: string, change: (text: string) => string): string {
  return markdown
    .split(CODE)
    .map((part, i) => (i % 2 === 0 ? change(part) : part))
    .join("");
}

const CODE = /(^ {0,3}(?:```|~~~)[\s\S]*?(?:^ {0,3}(?:```|~~~)[^\n]*$|(?![\s\S]))|`[^`\n]+`)/m;
const MENTION = /(^|[\s(,;])@([a-z0-9](?:[a-z0-9-]{0,38}[a-z0-9])?)(?![\w@-]|\.\w)/gi;
const SHORT = /(^|[\s(,;])#((?:dip|sweep|step|plate):[0-9a-z]{1,16})(?!\w)/g;
const LINK = /\[(?:\\.|[^[\]\\\n]){0,400}\]\(((?:person|dip|sweep|step|plate):[0-9a-z]{1,16})\)/g;
