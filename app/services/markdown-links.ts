import { escapeHtml } from "./html-text.ts";

/**
 * What a note speaks of inside its project is written as a link of our own: `[@Ada Marsh](person:k3f…)`,
 * `[7.081 MHz, SWR 1.21](dip:57b…)`, `[bridge.jpg](attachment:9ac…)`. The words are those of when it was written, so the
 * text reads by itself wherever it is taken.
 */
export const SUBJECT_KINDS = ["person", "dip", "sweep", "step", "plate", "attachment"] as const;
export type SubjectKind = (typeof SUBJECT_KINDS)[number];

/** What is known now of the subjects of notes, each by "kind:id"; what is not in it is shown as it was written. */
export interface NoteLinks {
  /** Names of members. */
  people: ReadonlyMap<string, string>;
  /** `now` null: only where it is, for what must read the same for ever. */
  references: ReadonlyMap<string, { path: string; now: string | null }>;
  attachments: ReadonlyMap<string, ShownAttachment>;
  /** For readers from outside: files of the project are named, not offered. */
  filesStay?: boolean;
}

export interface ShownAttachment {
  path: string;
  name: string;
  size: string;
  /** Pixels of the copy that is shown; null for what is no picture. */
  picture: { width: number; height: number } | null;
  /** Where it can be taken in as a sweep; null where it is none, or the reader may not. */
  sweepPath: string | null;
}

export const NO_LINKS: NoteLinks = { people: new Map(), references: new Map(), attachments: new Map() };

/** Every "kind:id" that a note names. */
export function subjectsIn(markdown: string): string[] {
  return [...new Set(Array.from(markdown.matchAll(WRITTEN), ([, subject]) => subject))];
}

export function isSubject(href: string): boolean {
  return SUBJECT.test(href);
}

/** Kept as text through the cleaning, until `drawLinks`. */
export function heldSubject(subject: string, text: string, shown = false): string {
  return `<span data-subject="${subject}"${shown ? ' data-shown="yes"' : ""}>${escapeHtml(text)}</span>`;
}

/** What `heldSubject` left in cleaned HTML → mentions, references and attachments as they are now. */
export function drawLinks(html: string, links: NoteLinks): string {
  return html.replace(HELD, (_, subject: string, shown: string | undefined, written: string) => {
    const [kind] = subject.split(":");
    if (kind === "person") return mention(links.people.get(subject), written);
    if (kind === "attachment" && links.filesStay)
      return `<span class="reference">${written} (a file of the project)</span>`;
    if (kind === "attachment")
      return attachment(links.attachments.get(subject), written, shown !== undefined);
    return reference(links.references.get(subject), written);
  });
}

function mention(name: string | undefined, written: string): string {
  return name === undefined ? written : `<span class="mention">@${escapeHtml(name)}</span>`;
}

function reference(known: { path: string; now: string | null } | undefined, written: string): string {
  if (!known) return `<span class="reference">${written}</span>`;
  const now =
    known.now === null ? "" : `<span class="reference-now" role="note">now: ${escapeHtml(known.now)}</span>`;
  return `<span class="reference"><a href="${escapeHtml(known.path)}">${written}</a>${now}</span>`;
}

function attachment(known: ShownAttachment | undefined, written: string, shown: boolean): string {
  if (!known) return `<span class="reference">${written} (the file is not there any more)</span>`;
  const path = escapeHtml(known.path);
  if (known.picture && shown) {
    const { width, height } = known.picture;
    const picture = `<img src="${path}/small" alt="${written.replaceAll('"', "&quot;")}" width="${width}" height="${height}" loading="lazy">`;
    return `<a class="attached-picture" href="${path}/shown">${picture}</a>`;
  }
  const size = `<span class="attached-size">${escapeHtml(known.size)}</span>`;
  const takeIn = known.sweepPath ? ` <a href="${escapeHtml(known.sweepPath)}">Take it in as a sweep</a>` : "";
  return `<span class="attached"><a href="${path}/file">${written}</a> ${size}${takeIn}</span>`;
}

const KINDS = SUBJECT_KINDS.join("|");
const SUBJECT = new RegExp(`^(?:${KINDS}):[0-9a-z]{1,16}$`);
const WRITTEN = new RegExp(`\\]\\(((?:${KINDS}):[0-9a-z]{1,16})\\)`, "g");
const HELD = new RegExp(
  `<span data-subject="((?:${KINDS}):[0-9a-z]{1,16})"( data-shown="yes")?>([^<]*)</span>`,
  "g",
);
