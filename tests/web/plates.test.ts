import { beforeAll, describe, expect, it } from "vitest";
import { plateListShape, plateShape } from "~/routes/api/plate-schemas";
import { askApi, Browser, SERVER } from "./browser.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn, tokenOf } from "./world.ts";

/** Plates of a private project: made by API and by form, read by anyone, mended, withdrawn. */

let crew: Crew;
let place: Place;
let token: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  token = await tokenOf(crew.experimenter);
});

const make = (body: Record<string, unknown>) =>
  askApi(`/projects/${place.project}/plates`, token, {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: JSON.stringify(body),
  });

describe("a plate by the API", () => {
  let id = "";

  it("is made once however often it is sent, and is the record that its page has", async () => {
    const wanted = { from: `dip:${place.dip}`, title: "The dip", clientKey: "one" };
    const answer = await make(wanted);
    expect(answer.status).toBe(201);
    const plate = plateShape.parse(await answer.json());
    id = plate.id;
    expect(answer.headers.get("Location")).toBe(`/api/v1/plates/${id}`);
    expect(plate).toMatchObject({ number: 1, version: 1, kind: "dip", previous: null });
    expect(plate.sources[0].sha256).toMatch(/^[0-9a-f]{64}$/);
    expect((await (await make(wanted)).json()).id).toBe(id);
    const read = await (await askApi(`/plates/${id}`, token)).json();
    expect(read).toEqual(plate);
    const { versions, mentions, ...record } = plate;
    expect([versions.map((one) => [one.id, one.version]), mentions]).toEqual([[[id, 1]], []]);
    expect(await (await new Browser().get(`/plates/${id}.json`)).json()).toEqual(record);
    const list = plateListShape.parse(
      await (await askApi(`/projects/${place.project}/plates`, token)).json(),
    );
    expect(list.items.map((one) => [one.id, one.number, one.withdrawnAt])).toEqual([[id, 1, null]]);
  });

  it("is refused where it is of nothing, or of nothing that is there", async () => {
    for (const from of ["", "sweep", "sweep:", "compare:only1", "dip:nothing000", "strip:x"]) {
      const said = await problemOf(await make({ from, title: "Nothing" }), 422);
      expect(said.errors?.map(({ field }) => field)).toEqual(["from"]);
    }
    expect((await problemOf(await make({ from: "strip", mends: id }), 422)).errors?.[0].field).toBe("wrong");
  });

  it("has a page that anyone reads, with its forms, its citation and where to embed it from in its head", async () => {
    const response = await new Browser().get(`/plates/${id}`);
    expect(response.status).toBe(200);
    const html = await response.text();
    const address = `${SERVER}/plates/${id}`;
    expect(html).toContain("<title>Plate 1: The dip · Swale</title>");
    expect(html).toContain(`<link rel="canonical" href="${address}"/>`);
    expect(html).toMatch(
      /<link rel="alternate" type="application\/json\+oembed" href="[^"]*\/oembed\?format=json/,
    );
    expect(html).toContain(`<meta property="og:image" content="${address}.png?width=1280"/>`);
    expect(html).toContain('<meta name="citation_title" content="Plate 1: The dip"/>');
    expect(html).toContain(`<link rel="webmention" href="${SERVER}/webmention"/>`);
    for (const ending of [".svg", ".pdf", ".csv", ".bib", ".csl.json"]) {
      expect(html).toContain(`href="${address}${ending}"`);
    }
    expect(html).not.toContain("New version");
    expect(html).not.toContain(`/projects/${place.project}/`);
  });

  it("is checked again by anyone, and says that nothing differs", async () => {
    const checked = await new Browser().post(`/plates/${id}`, { intent: "check" });
    expect(checked.status).toBe(200);
    expect(await checked.text()).toContain("Identical.");
  });

  it("is mended by a version that points to it, and both say so", async () => {
    const answer = await make({
      from: `dip:${place.dip}`,
      mends: id,
      wrong: "A slip.",
      caption: "Now right",
    });
    const second = plateShape.parse(await answer.json());
    expect(second).toMatchObject({ number: 1, version: 2, title: "The dip", caption: "Now right" });
    expect(second.previous).toMatchObject({ address: `${SERVER}/plates/${id}`, reason: "A slip." });
    const first = await (await new Browser().get(`/plates/${id}`)).text();
    expect(first).toContain(`href="/plates/${second.id}"`);
    expect(first).toContain("A slip.");
    const late = await problemOf(await make({ from: "strip", mends: id, wrong: "Too late." }), 422);
    expect(late.errors?.[0]).toMatchObject({ field: "mends" });
  });

  it("is withdrawn for good: its address says when and why, and nothing else of it", async () => {
    const owner = await signIn(crew.owner);
    expect((await owner.post(`/plates/${id}`, { intent: "withdraw", reason: " " })).status).toBe(400);
    expect((await owner.post(`/plates/${id}`, { intent: "withdraw", reason: "Not ours." })).status).toBe(302);
    const page = await new Browser().get(`/plates/${id}`);
    expect(page.status).toBe(410);
    const html = await page.text();
    expect(html).toContain("Not ours.");
    expect(html).not.toMatch(/<figcaption|MHz|sha256/i);
    expect((await new Browser().get(`/plates/${id}.svg`)).status).toBe(410);
    expect(await problemOf(await askApi(`/plates/${id}`, token), 410)).toMatchObject({
      code: "withdrawn",
      detail: expect.stringContaining("Not ours."),
    });
    expect((await owner.post(`/plates/${id}`, { intent: "withdraw", reason: "Again." })).status).toBe(410);
  });
});

describe("the form without scripts", () => {
  const fields = () => ({
    from: `sweep:${place.sweep}`,
    draw: "0123456789",
    title: "Drawn <by hand>",
    caption: "",
    licence: "CC0-1.0",
    low: "",
    high: "",
    scale: "linear",
    quantity: "swr",
    showTitle: "on",
  });

  it("shows the figure as it would be, with what was typed, and freezes nothing", async () => {
    const browser = await signIn(crew.experimenter);
    const path = `/projects/${place.project}/plates/new?from=sweep:${place.sweep}`;
    const listed = async () => {
      const page = await (await browser.get(`/projects/${place.project}/plates`)).text();
      return new Set(page.match(/href="\/plates\/[a-z0-9]{10}"/g));
    };
    const before = await listed();
    const html = await (await browser.post(path, { ...fields(), intent: "show" })).text();
    expect(html).toMatch(/<svg[^>]*>[\s\S]*Drawn &lt;by hand&gt;[\s\S]*<\/svg>/);
    expect(html).toContain('value="Drawn &lt;by hand&gt;"');
    expect(before.size).toBe(2);
    expect(await listed()).toEqual(before);
  });

  it("keeps what was typed where something is wrong with it", async () => {
    const browser = await signIn(crew.experimenter);
    const path = `/projects/${place.project}/plates/new?from=sweep:${place.sweep}`;
    const wrong = { ...fields(), title: "", low: "9", high: "8", caption: "Kept." };
    const answer = await browser.post(path, { ...wrong, intent: "freeze" });
    expect(answer.status).toBe(400);
    const html = await answer.text();
    expect(html).toContain("Give the plate a title.");
    expect(html).toContain("Kept.</textarea>");
  });

  it("freezes one plate of two presses", async () => {
    const browser = await signIn(crew.experimenter);
    const path = `/projects/${place.project}/plates/new?from=sweep:${place.sweep}`;
    const press = () => browser.post(path, { ...fields(), intent: "freeze" });
    const answers = await Promise.all([press(), press()]);
    const to = answers.map((answer) => answer.headers.get("Location"));
    expect(to[0]).toMatch(/^\/plates\/[a-z0-9]{10}$/);
    expect(to[1]).toBe(to[0]);
  });
});
