import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import * as blocks from "~/db/blocks.server";
import { db } from "~/db/client.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { invitations } from "~/db/schema";
import { createProject } from "~/services/projects.server";
import { Browser } from "./browser.ts";
import { codeFor, listTo, mailTo, pathIn } from "./mails.ts";
import { makePerson, type Someone, signIn, unique } from "./world.ts";

/** Invitations by mail and by link, handing a project over, and who was last there, over HTTP. */

let owner: Someone;
let browser: Browser;
let project: { id: number; publicId: string };
let title: string;
let members: string;

beforeAll(async () => {
  owner = await makePerson("host");
  browser = await signIn(owner);
  title = unique("A private mast");
  project = await createProject({ title, summary: "", visibility: "private", ituRegion: null }, owner.id);
  members = `/projects/${project.publicId}/members`;
});

const whereTo = (response: Response) => response.headers.get("Location");
const newAddress = () => `${unique("guest")}@fennmarsh.example`;

async function roleOf(person: { id: number }): Promise<string | undefined> {
  return (await projects.findMembers(project.id)).find((row) => row.userId === person.id)?.role;
}

async function makeLink(role = "reader", days = "7"): Promise<string> {
  const answer = await browser.post(members, { intent: "invite", role, days });
  expect(answer.headers.get("Cache-Control")).toBe("no-store");
  return /\/invitations\/[\w-]{32}/.exec(await answer.text())?.[0] ?? "no link";
}

async function inviteByMail(role = "commenter"): Promise<{ email: string; path: string }> {
  const email = newAddress();
  expect((await browser.post(members, { intent: "invite", email, role, days: "7" })).status).toBe(302);
  return { email, path: pathIn(await mailTo(email), "/invitations/") };
}

describe("an invitation by mail", () => {
  it("is taken by somebody new, who signs in with another address, and the sender hears of it", async () => {
    const { email, path } = await inviteByMail();
    const guest = new Browser();
    const page = await (await guest.get(path)).text();
    expect(page).toContain(title);
    expect(page).toContain("commenter");
    expect((await guest.post(path, {})).status).toBe(403);
    const own = newAddress();
    await guest.post("/auth/email", { intent: "ask", email: own, next: path });
    await guest.post("/auth/email", { intent: "code", code: await codeFor(own) });
    const made = await guest.post("/auth/email", { intent: "name", name: "Gwen Guest" });
    expect(whereTo(made)).toBe(path);
    expect(whereTo(await guest.post(path, {}))).toBe(`/projects/${project.publicId}`);
    const user = await people.findByEmail(own);
    expect(await roleOf({ id: user?.id ?? 0 })).toBe("commenter");
    const told = await mailTo(`${owner.userName}@example.com`);
    expect(told.text).toContain(email);
    expect(told.text).toContain("Gwen Guest");
    expect(await (await browser.get(members)).text()).toContain(`by Gwen Guest (${user?.userName})`);
  });

  it("is taken once", async () => {
    const { path } = await inviteByMail();
    const [first, second] = [await makePerson("first"), await makePerson("second")];
    const [one, two] = [await signIn(first), await signIn(second)];
    const answers = await Promise.all([one.post(path, {}), two.post(path, {})]);
    expect(answers.map(whereTo).sort()).toEqual([path, `/projects/${project.publicId}`]);
    const roles = [await roleOf(first), await roleOf(second)].filter(Boolean);
    expect(roles).toEqual(["commenter"]);
    const late = await new Browser().get(path);
    expect([late.status, await late.text()]).toEqual([410, expect.stringContaining("taken already")]);
  });

  it("is not mailed to somebody who blocked the sender", async () => {
    const shy = await makePerson("shy");
    await blocks.insert(shy.id, owner.id);
    const email = `${shy.userName}@example.com`;
    const answer = await browser.post(members, { intent: "invite", email, role: "reader", days: "1" });
    expect(answer.status).toBe(302);
    // Mails leave in order: when the next one is there, this one would be.
    await inviteByMail();
    expect(await listTo(email)).toEqual([]);
    const added = await browser.post(members, { intent: "add", userName: shy.userName, role: "reader" });
    expect([added.status, await added.text()]).toEqual([400, expect.stringContaining("be added by you")]);
    expect(await roleOf(shy)).toBeUndefined();
  });

  it("keeps the secret out of the table", async () => {
    const { email, path } = await inviteByMail();
    const [row] = await db.select().from(invitations).where(eq(invitations.email, email));
    expect(JSON.stringify(row)).not.toContain(path.replace("/invitations/", ""));
  });
});

describe("a link", () => {
  it("lets many in, counts them, and lets nobody in once it is revoked", async () => {
    const path = await makeLink();
    for (const word of ["first", "second"]) {
      const person = await makePerson(word);
      expect(whereTo(await (await signIn(person)).post(path, {}))).toBe(`/projects/${project.publicId}`);
      expect(await roleOf(person)).toBe("reader");
    }
    const text = await (await browser.get(members)).text();
    expect(text).toContain("2 times");
    const listed = [...text.matchAll(/name="invitation" value="([a-z0-9]{10})"/g)].map((match) => match[1]);
    for (const invitation of listed) await browser.post(members, { intent: "revoke", invitation });
    const late = await makePerson("late");
    const answer = await (await signIn(late)).post(path, {});
    expect(whereTo(answer)).toBe(path);
    expect(await roleOf(late)).toBeUndefined();
    expect((await new Browser().get(path)).status).toBe(410);
  });

  it("opens nothing when its time is over", async () => {
    const path = await makeLink();
    await db
      .update(invitations)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(invitations.projectId, project.id));
    const late = await makePerson("late");
    const guest = await signIn(late);
    expect((await guest.get(path)).status).toBe(410);
    await guest.post(path, {});
    expect(await roleOf(late)).toBeUndefined();
  });

  it("takes nothing from a member, and is not used up by one", async () => {
    const path = await makeLink();
    expect(whereTo(await browser.post(path, {}))).toBe(`/projects/${project.publicId}`);
    expect(await roleOf(owner)).toBe("owner");
    expect(await (await browser.get(members)).text()).toContain("not yet");
  });

  it("that nobody made is nothing", async () => {
    expect((await browser.get("/invitations/nothing-like-it")).status).toBe(404);
    expect((await browser.post("/invitations/nothing-like-it", {})).status).toBe(404);
  });

  it("can't make an owner", async () => {
    const answer = await browser.post(members, { intent: "invite", role: "owner", days: "7" });
    expect(answer.status).toBe(400);
  });
});

describe("handing a project over", () => {
  it("asks for the title, makes the other owner and tells them", async () => {
    const heir = await makePerson("heir");
    await projects.insertMember(project.id, heir.id, "reader");
    const form = { intent: "hand-over", userName: heir.userName, afterwards: "experimenter" };
    expect((await browser.post(members, { ...form, title: "another" })).status).toBe(400);
    expect(await roleOf(heir)).toBe("reader");
    expect((await browser.post(members, { ...form, title })).status).toBe(302);
    expect([await roleOf(heir), await roleOf(owner)]).toEqual(["owner", "experimenter"]);
    expect((await mailTo(`${heir.userName}@example.com`)).subject).toContain("You are owner");
    const back = await signIn(heir);
    const home = { ...form, userName: owner.userName, afterwards: "leave", title };
    expect(whereTo(await back.post(members, home))).toBe("/projects");
    expect([await roleOf(heir), await roleOf(owner)]).toEqual([undefined, "owner"]);
  });

  it("goes to members only", async () => {
    const stranger = await makePerson("stranger");
    const form = { intent: "hand-over", userName: stranger.userName, afterwards: "leave", title };
    expect((await browser.post(members, form)).status).toBe(400);
    expect(await roleOf(owner)).toBe("owner");
  });
});

describe("the list of members", () => {
  it("says to members, and to nobody else, when somebody was last there", async () => {
    await projects.update(project.id, { visibility: "public" });
    expect(await (await browser.get(members)).text()).toContain("Last here");
    expect(await (await new Browser().get(members)).text()).not.toContain("Last here");
    const row = (await projects.findMembers(project.id)).find((member) => member.userId === owner.id);
    expect(Date.now() - (row?.lastActiveAt?.getTime() ?? 0)).toBeLessThan(300_000);
    await projects.update(project.id, { visibility: "private" });
  });
});
