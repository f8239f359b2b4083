import { beforeAll, describe, expect, it } from "vitest";
import * as files from "~/db/files.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { createProject } from "~/services/projects.server";
import { getObject } from "~/services/storage.server";
import type { Browser } from "./browser.ts";
import { makePerson, type Someone, sendSweep, signIn, tokenOf, touchstone, unique } from "./world.ts";

/** Members, settings and deletion of a project, over HTTP. */

let owner: Someone;
let browser: Browser;
let project: { id: number; publicId: string };
let page: string;

beforeAll(async () => {
  owner = await makePerson("owner");
  browser = await signIn(owner);
});

async function makeProject(title = unique("Members")) {
  project = await createProject({ title, summary: "", visibility: "private", ituRegion: null }, owner.id);
  page = `/projects/${project.publicId}`;
  return title;
}

async function isStored(key: string): Promise<boolean> {
  return getObject(key).then(
    () => true,
    () => false,
  );
}

async function rolesOf(id = project.id): Promise<Record<string, string>> {
  const rows = await projects.findMembers(id);
  return Object.fromEntries(rows.map((row) => [row.userName, row.role]));
}

describe("members", () => {
  it("are added by user name, changed and removed; a double click is harmless", async () => {
    await makeProject();
    const other = await makePerson("other");
    const add = { intent: "add", userName: other.userName.toUpperCase(), role: "commenter" };
    const answers = await Promise.all([
      browser.post(`${page}/members`, add),
      browser.post(`${page}/members`, add),
    ]);
    expect(answers.map((answer) => answer.status)).toEqual([302, 302]);
    expect(await rolesOf()).toEqual({ [owner.userName]: "owner", [other.userName]: "commenter" });
    await browser.post(`${page}/members`, {
      intent: "change",
      userName: other.userName,
      role: "experimenter",
    });
    expect((await rolesOf())[other.userName]).toBe("experimenter");
    const remove = { intent: "remove", userName: other.userName };
    await Promise.all([browser.post(`${page}/members`, remove), browser.post(`${page}/members`, remove)]);
    expect(await rolesOf()).toEqual({ [owner.userName]: "owner" });
  });

  it("that nobody has heard of are not added, and the form says so", async () => {
    await makeProject();
    const answer = await browser.post(`${page}/members`, {
      intent: "add",
      userName: "no-such-person-here",
      role: "reader",
    });
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain("Nobody here is called no-such-person-here");
  });

  it("adding an owner again takes nothing away", async () => {
    await makeProject();
    await browser.post(`${page}/members`, { intent: "add", userName: owner.userName, role: "reader" });
    expect(await rolesOf()).toEqual({ [owner.userName]: "owner" });
  });
});

describe("two owners with the settings open at once", () => {
  const opened = (title: string) => ({
    intent: "about",
    was: JSON.stringify({ title, summary: "", visibility: "private", ituRegion: null }),
    visibility: "private",
  });

  it("do not undo one another's changes", async () => {
    const title = await makeProject();
    await browser.post(`${page}/settings`, { ...opened(title), title: `${title} renamed` });
    await browser.post(`${page}/settings`, { ...opened(title), title, summary: "About it" });
    const now = await projects.findWithRole(project.publicId, owner.id);
    expect(now?.project).toMatchObject({ title: `${title} renamed`, summary: "About it" });
  });

  it("are asked where both changed the same", async () => {
    const title = await makeProject();
    await browser.post(`${page}/settings`, { ...opened(title), title: `${title} renamed` });
    const answer = await browser.post(`${page}/settings`, { ...opened(title), title: `${title} other` });
    expect(answer.status).toBe(409);
    expect(await answer.text()).toContain("Somebody else changed this while you did");
    const now = await projects.findWithRole(project.publicId, owner.id);
    expect(now?.project.title).toBe(`${title} renamed`);
  });
});

describe("the last owner", () => {
  it.each([
    ["leave", () => ({ intent: "leave" })],
    ["be removed", () => ({ intent: "remove", userName: owner.userName })],
    ["be made a reader", () => ({ intent: "change", userName: owner.userName, role: "reader" })],
  ])("can't %s", async (_, form) => {
    await makeProject();
    const answer = await browser.post(`${page}/members`, form() as Record<string, string>);
    expect(answer.status).toBe(409);
    expect(await answer.text()).toContain("A project needs an owner");
    expect(await rolesOf()).toEqual({ [owner.userName]: "owner" });
  });

  it("is one of two who leave at the same moment", async () => {
    for (let round = 0; round < 5; round++) {
      await makeProject();
      const second = await makePerson("second");
      await projects.insertMember(project.id, second.id, "owner");
      const other = await signIn(second);
      const answers = await Promise.all([
        browser.post(`${page}/members`, { intent: "leave" }),
        other.post(`${page}/members`, { intent: "leave" }),
      ]);
      expect(answers.map((answer) => answer.status).sort()).toEqual([302, 409]);
      expect(Object.values(await rolesOf())).toEqual(["owner"]);
    }
  });
});

describe("settings", () => {
  it("change the title, the summary and who can read", async () => {
    await makeProject();
    const form = {
      intent: "about",
      title: "A reed bank",
      summary: "*Two* elements",
      visibility: "public",
      ituRegion: "1",
    };
    expect((await browser.post(`${page}/settings`, form)).status).toBe(302);
    const changed = (await projects.findWithRole(project.publicId, owner.id))?.project;
    expect(changed).toMatchObject({ title: "A reed bank", visibility: "public", ituRegion: 1 });
  });

  it("keep design bands row by row, without scripts, and say which row is wrong", async () => {
    await makeProject();
    const rows = {
      intent: "bands",
      "bands[0].name": "40 m",
      "bands[0].lowMhz": "7",
      "bands[0].highMhz": "7,2",
      "bands[0].swrLimit": "2",
      "bands[1].name": "",
      "bands[1].lowMhz": "",
      "bands[1].highMhz": "",
      "bands[1].swrLimit": "2",
      "bands[2].name": "17 m",
      "bands[2].lowMhz": "18.068",
      "bands[2].highMhz": "18.168",
      "bands[2].swrLimit": "1.5",
    };
    expect((await browser.post(`${page}/settings`, rows)).status).toBe(302);
    const kept = await projects.findDesignBands(project.id);
    expect(kept.map(({ name, lowHz, highHz, swrLimit }) => [name, lowHz, highHz, swrLimit])).toEqual([
      ["40 m", 7_000_000, 7_200_000, 2],
      ["17 m", 18_068_000, 18_168_000, 1.5],
    ]);
    const wrong = await browser.post(`${page}/settings`, { ...rows, "bands[2].highMhz": "18" });
    expect(wrong.status).toBe(400);
    expect(await wrong.text()).toContain("The upper edge lies below the lower one.");
    expect(await projects.findDesignBands(project.id)).toHaveLength(2);
  });

  it("delete only when the title is typed, and then the files too", async () => {
    const title = await makeProject();
    const taken = await sendSweep(project.publicId, await tokenOf(owner), touchstone());
    expect(taken.status).toBe(201);
    const [key] = await files.findStorageKeys(project.id);
    expect(await isStored(key)).toBe(true);
    const wrong = await browser.post(`${page}/settings`, { intent: "delete", title: "another" });
    expect(wrong.status).toBe(400);
    expect((await browser.get(page)).status).toBe(200);
    const right = await browser.post(`${page}/settings`, { intent: "delete", title });
    expect(right.headers.get("Location")).toBe("/projects");
    expect((await browser.get(page)).status).toBe(404);
    expect(await files.isStorageKeyUsed(key)).toBe(false);
    // The object goes in the background, soon.
    await expect.poll(() => isStored(key), { timeout: 20_000, interval: 500 }).toBe(false);
  });
});

describe("administration", () => {
  it("suspends an account at once, with its sessions and tokens, and restores it", async () => {
    const admin = await signIn(await makePerson("admin", { administrator: true }));
    const someone = await makePerson("someone");
    const theirs = await signIn(someone);
    const suspended = await admin.post("/admin", { intent: "suspend", user: someone.publicId });
    expect(suspended.status).toBe(302);
    expect((await theirs.get("/settings")).status).toBe(302);
    await admin.post("/admin", { intent: "restore", user: someone.publicId });
    expect((await people.findById(someone.id))?.suspendedAt).toBeNull();
    expect((await theirs.get("/settings")).status).toBe(302);
  });

  it("shows counts, and no title of a private project", async () => {
    const title = await makeProject(unique("Never shown"));
    const admin = await signIn(await makePerson("admin", { administrator: true }));
    const text = await (await admin.get("/admin")).text();
    expect(text).toContain("Stored originals");
    expect(text).not.toContain(title);
  });
});

describe("account settings", () => {
  it("refuse a user name that is taken or not one", async () => {
    const holder = await makePerson("holder");
    const person = await makePerson("person");
    const own = await signIn(person);
    const form = { intent: "profile", name: "N", timeZone: "UTC" };
    const taken = await own.post("/settings", { ...form, userName: holder.userName });
    expect(taken.status).toBe(409);
    expect(await taken.text()).toContain("Somebody has this user name");
    for (const userName of ["-x", "x-", "a b", "ü", "x".repeat(41)]) {
      const answer = await own.post("/settings", { ...form, userName });
      expect([userName, answer.status]).toEqual([userName, 400]);
    }
    expect((await people.findById(person.id))?.userName).toBe(person.userName);
  });

  it("keep a call sign, a region and a time zone, and refuse a zone that is none", async () => {
    const person = await makePerson("person");
    const own = await signIn(person);
    const form = { intent: "profile", name: "Nell\u202e", userName: person.userName, ituRegion: "1" };
    const wrong = await own.post("/settings", { ...form, timeZone: "Europe/Nowhere" });
    expect([wrong.status, await wrong.text()]).toEqual([
      400,
      expect.stringContaining("time zone of the list"),
    ]);
    await own.post("/settings", { ...form, callSign: "0XX0NN", timeZone: "Europe/Lisbon" });
    const kept = { name: "Nell", callSign: "0XX0NN", ituRegion: 1, timeZone: "Europe/Lisbon" };
    expect(await people.findById(person.id)).toMatchObject(kept);
    expect(await (await own.get("/projects/new")).text()).toMatch(/value="1" selected/);
    await own.post("/settings", { ...form, ituRegion: "", callSign: "", timeZone: "UTC" });
    expect(await people.findById(person.id)).toMatchObject({ callSign: "", ituRegion: null });
  });
});
