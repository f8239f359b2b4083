import { beforeAll, describe, expect, it } from "vitest";
import { askApi, Browser } from "./browser.ts";
import {
  type Crew,
  makeCrew,
  makePerson,
  makePlace,
  type Place,
  sendSweep,
  signIn,
  tokenOf,
  touchstone,
} from "./world.ts";

/** Comparing sweeps of several projects, without scripts, and the same by the API. */

let crew: Crew;
let here: Place;
let hidden: Place;
let second: string;
let member: Browser;
let token: string;

beforeAll(async () => {
  crew = await makeCrew();
  here = await makePlace(crew, "public");
  hidden = await makePlace(crew, "private");
  token = await tokenOf(crew.reader);
  member = await signIn(crew.reader);
  const sent = await sendSweep(here.project, await tokenOf(crew.owner), touchstone(), {
    title: "A second <try>",
  });
  second = (await sent.json()).id;
});

const compare = (query: string) => `/projects/${here.project}/compare${query}`;
/** Without the marks that part a sentence where a number was put in. */
const textOf = async (browser: Browser, query: string) =>
  (await (await browser.get(compare(query))).text()).replaceAll("<!-- -->", "");

describe("the page", () => {
  it("lays sweeps over one another in the order of the address, with dips and bands side by side", async () => {
    const text = await textOf(member, `?sweep=${second}&sweep=${here.sweep}&axis=log&from=6.5&to=7.5`);
    for (const heading of ["Over one another", "Dips side by side", "Bands side by side"]) {
      expect(text).toContain(heading);
    }
    expect(text).toContain("A second &lt;try&gt;");
    expect(text.indexOf(`/sweeps/${second}"`)).toBeLessThan(text.indexOf(`/sweeps/${here.sweep}"`));
    expect(text).toContain("National limits differ");
    expect(text).toMatch(/aria-current="true"[^>]*>Logarithmic/);
  });

  it("says of a hidden sweep what it says of none, and nothing else", async () => {
    const stranger = await signIn(await makePerson("stranger"));
    for (const browser of [new Browser(), stranger]) {
      const text = await textOf(browser, `?sweep=${here.sweep}&sweep=${hidden.sweep}`);
      expect(text).toContain("One of the sweeps is not here");
      expect(text).not.toContain(hidden.title);
      expect(text).not.toContain(hidden.dip);
      const none = await textOf(browser, `?sweep=${here.sweep}&sweep=nothing123`);
      expect(none).toContain("One of the sweeps is not here");
    }
    const text = await textOf(member, `?sweep=${here.sweep}&sweep=${hidden.sweep}`);
    expect(text).not.toContain("not here");
    expect(text).toContain(hidden.title);
  });

  it("takes a pasted address, and says what is none", async () => {
    const pasted = `https://swale.example/projects/${hidden.project}/sweeps/${hidden.sweep}?view=swr`;
    const added = await member.get(compare(`?sweep=${here.sweep}&add=${encodeURIComponent(pasted)}`));
    expect(added.status).toBe(302);
    expect(added.headers.get("Location")).toContain(`?sweep=${here.sweep}&sweep=${hidden.sweep}`);
    const text = await textOf(member, "?add=%3Cscript%3E+nowhere");
    expect(text).toContain("is no address of a sweep");
    expect(text).not.toContain("<script> nowhere");
  });

  it("finds sweeps to choose by their words, and teaches where nothing is chosen", async () => {
    expect(await textOf(member, "")).toContain("Choose the sweeps to lay over one another");
    expect(await textOf(member, "?q=second")).toContain(`value="${second}"`);
    expect(await textOf(member, "?q=no+such+words_%25")).toContain(
      "No sweep of this project has these words",
    );
  });

  it("is led to from the list, the sweep and the step", async () => {
    const base = `/projects/${here.project}`;
    const list = await (await member.get(`${base}/sweeps`)).text();
    expect(list).toMatch(new RegExp(`<input type="checkbox"[^>]*name="sweep"[^>]*value="${second}"`));
    const page = await (await member.get(`${base}/sweeps/${second}`)).text();
    expect(page).toContain(`${base}/compare?sweep=${second}`);
  });

  it("compares twelve and says that there were more", async () => {
    const many = Array.from({ length: 14 }, (_, i) => `sweep=none-${i}`).join("&");
    expect(await textOf(member, `?${many}`)).toContain("At most 12 sweeps are compared");
  });
});

describe("the API", () => {
  it("answers dips and bands side by side of what the token may read", async () => {
    const query = `?sweep=${here.sweep}&sweep=${hidden.sweep}&sweep=nothing123&reference=${hidden.sweep}`;
    const path = `/projects/${here.project}/compare${query}`;
    const all = await (await askApi(path, token)).json();
    expect(all).toMatchObject({ reference: hidden.sweep, missing: ["nothing123"] });
    expect(all.sweeps.map(({ project }: { project: string }) => project)).toEqual([
      here.project,
      hidden.project,
    ]);
    // Both files hold one resonator at 7.1 MHz, so that nothing moved.
    const [[first, reference]] = all.dips;
    expect(Math.abs(first.movement.byHz)).toBeLessThan(1000);
    expect(reference.movement).toBeNull();
    expect(all.bands.find(({ name }: { name: string }) => name === "40 m").figures).toHaveLength(2);
    const strangers = await (await askApi(path, await tokenOf(await makePerson("stranger")))).json();
    expect(strangers.missing).toEqual([hidden.sweep, "nothing123"]);
    expect(JSON.stringify(strangers)).not.toContain(hidden.project);
  });

  it("answers a sweep's bands, with SWR after the closed form", async () => {
    const answer = await (await askApi(`/sweeps/${here.sweep}/bands?limit=3`, token)).json();
    const forty = answer.bands.find(({ name }: { name: string }) => name === "40 m");
    // 60 Ω at 7.1 MHz with X = 1000·(f/f0 − f0/f). The region is not said: the union of the three goes up to 7.3 MHz.
    const at = (mhz: number) => {
      const reactance = 1000 * (mhz / 7.1 - 7.1 / mhz);
      const g = Math.hypot(10, reactance) / Math.hypot(110, reactance);
      return (1 + g) / (1 - g);
    };
    expect(forty).toMatchObject({ limitSwr: 3, design: false, covered: 1 });
    expect(forty.swrLow).toBeCloseTo(at(7), 2);
    expect(forty.swrMiddle).toBeCloseTo(at(7.15), 2);
    expect(forty.swrHigh).toBeCloseTo(at(7.3), 2);
    expect(forty.bestSwr).toBeCloseTo(1.2, 2);
    expect((await askApi(`/sweeps/${here.sweep}/bands?limit=1`, token)).status).toBe(422);
  });
});
