import { execFileSync } from "node:child_process";
import { beforeEach, describe, expect, it } from "vitest";
import * as feedTokens from "~/db/feed-tokens.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { accountOf, putAway, sinceLast } from "~/services/activity.server";
import { drawFeed, etagOf, makeFeedToken, projectOfToken } from "~/services/feed.server";
import { removeNote } from "~/services/note-changes.server";
import { writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";

let ada: { id: number };
let bram: { id: number };
let project: projects.Project;

beforeEach(async () => {
  const person = async (name: string) => ({
    id: await people.insert({ userName: `${name}-${newPublicId()}`, name, email: null }),
  });
  ada = await person("Ada");
  bram = await person("Bram <b>&");
  const made = await createProject(
    { title: "Reeds & <banks>", summary: "", visibility: "private", ituRegion: null },
    ada.id,
  );
  await projects.insertMember(made.id, bram.id, "commenter");
  project = (await projects.findWithRoleById(made.id, ada.id))?.project as projects.Project;
});

const write = (author: { id: number }, body: string) =>
  writeNote({ project, author, place: { projectId: project.id, sweepId: null, dipId: null }, body });

describe("since you were last here", () => {
  it("counts what others did, until it is put away", async () => {
    await write(ada, "mine");
    expect(await sinceLast(project, ada.id)).toBeNull();
    await write(bram, "one");
    await write(bram, "two");
    const since = await sinceLast(project, ada.id);
    expect(since?.counts).toEqual(["2 notes"]);
    expect((await sinceLast(project, ada.id))?.counts).toEqual(["2 notes"]);
    await write(bram, "three");
    await putAway(project, ada.id, since?.mark ?? "");
    const later = await sinceLast(project, ada.id);
    expect(later?.counts).toEqual(["1 note"]);
    const { days } = await accountOf(project, { since: later?.since });
    expect(days.flatMap(({ lines }) => lines.map(({ words, count }) => [words, count]))).toEqual([
      ["A note on", 1],
    ]);
  });

  it("never goes back, and takes no other project's mark", async () => {
    await write(bram, "one");
    const early = (await sinceLast(project, ada.id))?.mark ?? "";
    await write(bram, "two");
    const late = (await sinceLast(project, ada.id))?.mark ?? "";
    await putAway(project, ada.id, late);
    await putAway(project, ada.id, early);
    await putAway({ id: project.id + 1 }, ada.id, late);
    expect(await sinceLast(project, ada.id)).toBeNull();
    expect(await sinceLast(project, 999_999_999)).toBeNull();
  });
});

describe("the account", () => {
  it("goes on where a page ended, each event once", async () => {
    for (let i = 0; i < 104; i++) await write(i % 2 ? ada : bram, `note ${i}`);
    const first = await accountOf(project);
    const second = await accountOf(project, { cursor: first.nextCursor ?? "" });
    const count = (account: typeof first) =>
      account.days.flatMap(({ lines }) => lines.map((line) => line.count)).reduce((a, b) => a + b, 0);
    expect([count(first), second.nextCursor]).toEqual([100, null]);
    expect(count(second)).toBeGreaterThanOrEqual(4);
    expect(count(second)).toBeLessThan(8);
    expect((await accountOf(project, { cursor: "nonsense" })).days).not.toEqual([]);
  });
});

describe("the feed", () => {
  it("is what RFC 4287 asks for, by another parser", async () => {
    await write(bram, "A <script>note</script> & \u0001\ufffe more");
    await write(ada, "Another");
    const feed = parseFeed(await drawFeed(project));
    expect(feed.title).toBe("Reeds & <banks>: what happened");
    expect(feed.entries).toBeGreaterThanOrEqual(2);
    expect(feed.missing).toEqual([]);
    expect(feed.authors).toContain("Bram <b>&");
    expect(feed.summaries).toContain("Another");
    expect(feed.summaries.join()).toContain("<script>note</script>");
  });

  it("holds no text of a note that was removed, and else stays the same", async () => {
    const { publicId } = await write(bram, "soon gone");
    const before = await drawFeed(project);
    expect(etagOf(await drawFeed(project))).toBe(etagOf(before));
    expect(before).toContain("soon gone");
    await removeNote({ project, notePublicId: publicId, by: bram, mayModerate: false });
    expect(await drawFeed(project)).not.toContain("soon gone");
  });

  it("is opened by a member's key, until it is revoked or the member is one no more", async () => {
    const key = await makeFeedToken(bram.id, project.id);
    expect((await projectOfToken(project.publicId, key))?.id).toBe(project.id);
    expect(await projectOfToken("anotherone", key)).toBeUndefined();
    expect(await projectOfToken(project.publicId, `${key}x`)).toBeUndefined();
    await projects.deleteMember(project.id, bram.id);
    expect(await projectOfToken(project.publicId, key)).toBeUndefined();
    await projects.insertMember(project.id, bram.id, "reader");
    await people.update(bram.id, { suspendedAt: new Date() });
    expect(await projectOfToken(project.publicId, key)).toBeUndefined();
    await people.update(bram.id, { suspendedAt: null });
    const [listed] = await feedTokens.findAllByUser(bram.id, project.id);
    await feedTokens.revoke(ada.id, listed.publicId);
    expect(await projectOfToken(project.publicId, key)).toBeDefined();
    await feedTokens.revoke(bram.id, listed.publicId);
    expect(await projectOfToken(project.publicId, key)).toBeUndefined();
  });
});

/** What Python's own XML parser makes of it; `missing` names what the RFC (4.1.1, 4.1.2) asks for and is not there once. */
function parseFeed(text: string): {
  title: string;
  entries: number;
  missing: string[];
  authors: string[];
  summaries: string[];
} {
  const program = `
import sys, json, xml.etree.ElementTree as E, datetime
A = "{http://www.w3.org/2005/Atom}"
f = E.fromstring(sys.stdin.buffer.read())
missing = [] if f.tag == A + "feed" else ["feed"]
entries = f.findall(A + "entry")
for e in [f, *entries]:
    for n in ("id", "title", "updated"):
        if len(e.findall(A + n)) != 1: missing.append(e.tag + " " + n)
    if len(e.findall(A + "author")) < 1: missing.append("author")
    datetime.datetime.fromisoformat(e.find(A + "updated").text.replace("Z", "+00:00"))
ids = [e.find(A + "id").text for e in entries]
if len(set(ids)) != len(ids): missing.append("unique id")
print(json.dumps({"title": f.find(A + "title").text, "entries": len(entries), "missing": missing,
  "authors": [n.text for n in f.iter(A + "name")], "summaries": [n.text for n in f.iter(A + "summary")]}))`;
  return JSON.parse(execFileSync("/usr/bin/python3", ["-c", program], { input: text, encoding: "utf8" }));
}
