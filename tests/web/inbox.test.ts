import { beforeAll, describe, expect, it } from "vitest";
import { Browser, SERVER } from "./browser.ts";
import { listTo, mailTo, pathIn, textsTo } from "./mails.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn } from "./world.ts";

/** From a note that names somebody to a mail, to the answer, to no more mails, over HTTP. */

let crew: Crew;
let place: Place;
let owner: Browser;
let named: Browser;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  [owner, named] = [await signIn(crew.owner), await signIn(crew.experimenter)];
});

const addressOf = ({ userName }: { userName: string }) => `${userName}@example.com`;
const sayTo = (userName: string, body: string) =>
  owner.post(`/projects/${place.project}/notes`, { body: `@${userName} ${body}`, dip: place.dip });

describe("being named", () => {
  it("comes as a mail with the dip's drawing, whose link leads to where it is answered", async () => {
    expect((await sayTo(crew.experimenter.userName, "what is this?")).status).toBe(302);
    const mail = await mailTo(addressOf(crew.experimenter));
    expect(mail.subject).toContain("named you on");
    expect(mail.text).toContain("what is this?");
    expect(JSON.stringify(mail)).toContain("image/png");
    const path = pathIn(mail, `/projects/${place.project}/notes/`);
    const there = (await named.get(path)).headers.get("Location") ?? "";
    expect(there).toContain(`/dips/${place.dip}`);
    const page = await (await named.get(there.split("#")[0])).text();
    const note = path.split("/").at(-1) ?? "";
    expect(page).toContain(`id="note-${note}"`);
    const answer = await named.post(`/projects/${place.project}/notes`, {
      body: "It is the second element.",
      dip: place.dip,
      parent: note,
    });
    expect(answer.status).toBe(302);
    const back = await mailTo(addressOf(crew.owner));
    expect(back.subject).toContain("answered you on");
    const inbox = await (await owner.get("/inbox")).text();
    expect(inbox).toContain("It is the second element.");
    expect(inbox).toMatch(/\b1(<!-- -->)? unread/);
  });

  it("can be kept from the post without signing in, by a page or by one press", async () => {
    const mail = await mailTo(addressOf(crew.experimenter));
    const way = pathIn(mail, "/unsubscribe/");
    const nobody = new Browser();
    expect(await (await nobody.get(way)).text()).toContain("Stop these mails?");
    // As RFC 8058, 3.2 has it: no cookies, no origin, this body.
    const pressed = await fetch(new URL(way, SERVER), {
      method: "POST",
      body: new URLSearchParams({ "List-Unsubscribe": "One-Click" }),
    });
    expect(pressed.status).toBe(200);
    expect(await pressed.text()).not.toContain(place.title);
    // Programs that run in a browser send their own origin, or none that can be told; each is taken.
    for (const origin of ["https://mail.fennmarsh.example", "null"]) {
      const answer = await fetch(new URL(way, SERVER), {
        method: "POST",
        headers: { Origin: origin, "Sec-Fetch-Site": "cross-site" },
        body: new URLSearchParams({ "List-Unsubscribe": "One-Click" }),
      });
      expect(answer.status, origin).toBe(200);
    }
    await sayTo(crew.experimenter.userName, "and this?");
    await sayTo(crew.commenter.userName, "you too");
    const waits = { timeout: 20_000, interval: 200 };
    await expect.poll(async () => (await named.get("/inbox")).text(), waits).toContain("and this?");
    // What was said after it has gone out, so the mail that does not come would have come.
    await expect.poll(() => textsTo(addressOf(crew.commenter)), waits).toContain("you too");
    expect(await listTo(addressOf(crew.experimenter))).toHaveLength(1);
  });
});
