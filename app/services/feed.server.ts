import { createHash, randomBytes } from "node:crypto";
import { effectiveRole } from "~/auth/permissions";
import * as activity from "~/db/activity.server";
import * as feedTokens from "~/db/feed-tokens.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { happened, placesOf } from "./activity.server.ts";
import { foldDays } from "./activity-lines.ts";
import { plainText } from "./markdown.server.ts";
import { hashOfToken } from "./tokens.server.ts";

/** Makes an address's key for a feed reader, which can't sign in; its text is not kept. */
export async function makeFeedToken(userId: number, projectId: number): Promise<string> {
  const text = randomBytes(32).toString("base64url");
  await feedTokens.insert(userId, projectId, hashOfToken(text));
  return text;
}

/** The project that the key opens, asked anew each time: whoever lost access reads nothing more. */
export async function projectOfToken(publicId: string, text: string): Promise<projects.Project | undefined> {
  if (text.length > 100) return undefined;
  const found = await feedTokens.findByHash(hashOfToken(text));
  if (!found || found.project !== publicId) return undefined;
  const known = await projects.findWithRole(publicId, found.userId);
  if (!known || !effectiveRole(known.role, known.project.visibility)) return undefined;
  const lastMs = found.lastUsedAt?.getTime() ?? 0;
  if (Date.now() - lastMs > NOTED_EVERY_MS) await feedTokens.setUsed(found.id);
  return known.project;
}

/** The newest events as an Atom feed (RFC 4287): one entry an event, and of a note that is still there its beginning. */
export async function drawFeed(project: projects.Project): Promise<string> {
  const rows = await activity.findPage(project.id, { limit: ENTRIES });
  const noteIds = rows.flatMap(({ kind, about }) => (kind === "note.added" ? (about.note ?? []) : []));
  const [placeOf, texts] = await Promise.all([
    placesOf(project, rows),
    activity.findNoteTexts(project.id, [...new Set(noteIds)]),
  ]);
  const page = `${env.BASE_URL}/projects/${project.publicId}`;
  const entries = rows.map((row) => {
    const event = happened(row);
    const line = foldDays([event], placeOf)[0].lines[0];
    const text = row.kind === "note.added" && row.about.note ? texts.get(row.about.note) : undefined;
    const to = line.items[0].to ? `${env.BASE_URL}${line.items[0].to}` : `${page}/activity`;
    return `<entry>
<id>urn:uuid:${uuidOf([project.publicId, row.kind, row.at.toISOString(), JSON.stringify(row.about)])}</id>
<title>${escapeXml(`${line.words} ${line.items[0].title}`)}</title>
<updated>${row.at.toISOString()}</updated>
<author><name>${escapeXml(event.by ?? "Swale")}</name></author>
<link rel="alternate" href="${escapeXml(to)}"/>
${text ? `<summary>${escapeXml(plainText(text, SUMMARY))}</summary>\n` : ""}</entry>`;
  });
  return `<?xml version="1.0" encoding="utf-8"?>
<feed xmlns="http://www.w3.org/2005/Atom" xml:lang="en">
<id>urn:uuid:${uuidOf([project.publicId])}</id>
<title>${escapeXml(`${project.title}: what happened`)}</title>
<updated>${(rows[0]?.at ?? project.createdAt).toISOString()}</updated>
<author><name>Swale</name></author>
<link rel="alternate" href="${page}/activity"/>
<link rel="self" href="${page}/activity.atom"/>
${entries.join("\n")}
</feed>
`;
}

export function etagOf(text: string): string {
  return `"${createHash("sha256").update(text).digest("base64url").slice(0, 27)}"`;
}

/** Text as XML may hold it: what XML has no place for is left out. */
export function escapeXml(text: string): string {
  return Array.from(text)
    .filter((sign) => /[\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/u.test(sign))
    .join("")
    .replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
}

/** The same for the same event for ever, and made of nothing that counts: version 8 of RFC 9562. */
export function uuidOf(parts: string[]): string {
  const bytes = createHash("sha256").update(parts.join("\n")).digest().subarray(0, 16);
  bytes[6] = (bytes[6] & 0x0f) | 0x80;
  bytes[8] = (bytes[8] & 0x3f) | 0x80;
  return bytes.toString("hex").replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, "$1-$2-$3-$4-$5");
}

const ENTRIES = 50;
const SUMMARY = 300;
const NOTED_EVERY_MS = 60_000;
