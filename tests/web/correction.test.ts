import { beforeAll, describe, expect, it } from "vitest";
import { benchFile, GOOD_BRIDGE } from "../bench-files.ts";
import { askApi, type Browser } from "./browser.ts";
import { type Crew, makeCrew, makePlace, type Place, sendSweep, signIn, tokenOf, unique } from "./world.ts";

/** A bench and a feedline on a sweep's page, its downloads and the API, without scripts. */

let crew: Crew;
let place: Place;
let experimenter: Browser;
let token: string;
let bench: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "public", true);
  experimenter = await signIn(crew.experimenter);
  token = await tokenOf(crew.experimenter);
  const file = (kind: "open" | "short" | "load") =>
    new File([benchFile(GOOD_BRIDGE, kind, ` ${unique(kind)}`)], `${kind}.csv`);
  const answer = await experimenter.post(`/projects/${place.project}/benches/new`, {
    name: "Home bridge",
    validFrom: "2026-05-03",
    open: file("open"),
    short: file("short"),
    load: file("load"),
  });
  bench = (answer.headers.get("Location") ?? "").split("/").at(-1) ?? "";
});

async function send(fields: Record<string, string> = {}) {
  const text = benchFile(GOOD_BRIDGE, "antenna", ` ${unique("antenna")}`);
  return sendSweep(place.project, token, text, { takenAt: "2026-06-01", ...fields }, "vertical.csv");
}

const pageOf = (sweep: string) => `/projects/${place.project}/sweeps/${sweep}`;
const textOf = async (path: string) => (await experimenter.get(path)).text();

describe("the API", () => {
  it("takes a sweep in with a bench and answers its correction and limits", async () => {
    const answer = await send({ bench });
    expect(answer.status).toBe(201);
    const sweep = await answer.json();
    expect(sweep.correction).toMatchObject({
      kind: "scalar",
      plane: "port",
      fromHz: 1e6,
      toHz: 100e6,
      bench: { id: bench, name: "Home bridge", version: 1 },
      feedline: null,
    });
    // 60 Ω against 50 Ω, by the closed form behind the file.
    const [dip] = sweep.dips;
    expect(dip.minimumSwrLow).toBeLessThanOrEqual(1.2);
    expect(dip.minimumSwrHigh).toBeGreaterThanOrEqual(1.2);
    const ask = (query: string) => askApi(`/sweeps/${sweep.id}/points?max=10${query}`, token);
    const [corrected, measured] = await Promise.all([
      ask("").then((one) => one.json()),
      ask("&plane=instrument").then((one) => one.json()),
    ]);
    expect([corrected.correction.plane, measured.correction.plane]).toEqual(["port", "instrument"]);
    expect(measured.points.magnitude[0]).toBeLessThan(corrected.points.magnitude[0] / 2);
  });

  it("answers a sweep without a bench as measured, with unknown limits as null", async () => {
    const sweep = await (await send()).json();
    expect(sweep.correction).toEqual({
      kind: "none",
      plane: "instrument",
      fromHz: null,
      toHz: null,
      bench: null,
      feedline: null,
    });
    expect([sweep.dips[0].minimumSwrLow, sweep.dips[0].returnLossHighDb]).toEqual([null, null]);
  });

  it("refuses a bench that can't be used here, and stores nothing", async () => {
    const answer = await send({ bench: "0000000000" });
    expect(answer.status).toBe(422);
    expect((await answer.json()).errors).toEqual([expect.objectContaining({ field: "bench" })]);
  });
});

describe("the sweep's page", () => {
  it("says what is missing, then corrects with the bench that is said", async () => {
    const { id } = await (await send()).json();
    expect(await textOf(pageOf(id))).toContain("needs the bench that it was taken with");
    const answer = await experimenter.post(pageOf(id), { intent: "bench", bench });
    expect(answer.status).toBe(302);
    const html = await textOf(pageOf(id));
    expect(html).toContain(
      "Corrected with the bench “Home bridge” as of 3 May 2026: 0 dB line from open and short",
    );
    expect((await experimenter.post(pageOf(id), { intent: "bench", bench: "nobody" })).status).toBe(400);
  });

  it("tries a plane in the address and keeps it by the form", async () => {
    const { id } = await (await send({ bench })).json();
    const line = { cable: "values", lengthM: "20", velocityFactor: "0,66", k1: "0.01", k2: "" };
    const said = await experimenter.post(pageOf(id), { intent: "feedline", ...line });
    expect(said.headers.get("Location")).toBe(`${pageOf(id)}?plane=antenna`);
    expect(await textOf(`${pageOf(id)}?plane=antenna`)).toContain("20.0\u2009m of own values taken away");
    const kept = async () => (await (await askApi(`/sweeps/${id}`, token)).json()).correction.plane;
    expect(await kept()).toBe("port");
    await experimenter.post(pageOf(id), {
      intent: "settings",
      swrLimit: "2",
      minimumProminenceDb: "3",
      plane: "antenna",
    });
    expect(await kept()).toBe("antenna");
  });

  it.each([
    ["no length", { lengthM: "" }, "Give a length over 0"],
    ["a length that is none", { lengthM: "ten" }, "Give the length in metres."],
    ["a velocity factor over 1", { velocityFactor: "1.2" }, "A velocity factor lies between 0.3 and 1."],
    ["figures without loss", { k1: "0" }, "Give k1 or k2 over 0"],
    ["no such cable", { cable: "a wet string" }, "There is no such cable any more."],
  ])("refuses a feedline with %s, in words", async (_, change, words) => {
    const { id } = await (await send()).json();
    const line = { cable: "values", lengthM: "20", velocityFactor: "0.66", k1: "0.01", k2: "" };
    const answer = await experimenter.post(pageOf(id), { intent: "feedline", ...line, ...change });
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain(words);
  });

  it("gives points with limits at the plane that is seen", async () => {
    const { id } = await (await send({ bench })).json();
    const rows = (await textOf(`${pageOf(id)}/sweep.csv`)).split("\r\n");
    expect(rows[0]).toContain("swr_low,swr_high");
    const cells = rows[80].split(",").map(Number);
    const [, magnitude, , swr, , , low, high] = cells;
    expect(magnitude).toBeGreaterThan(0);
    expect(low).toBeLessThan(swr);
    expect(high === 0 || high > swr).toBe(true);
    expect((await textOf(`${pageOf(id)}/sweep.csv?plane=instrument`)).split("\r\n")[0]).not.toContain(
      "swr_low",
    );
  });
});

describe("cables of a project", () => {
  it("are added by points of a sheet and chosen as a feedline", async () => {
    const cables = `/projects/${place.project}/cables`;
    const name = unique("Reel");
    const refused = await experimenter.post(cables, {
      intent: "add",
      name,
      points: "10",
      velocityFactor: "0.8",
    });
    expect(refused.status).toBe(400);
    const fields = {
      intent: "add",
      name,
      points: "10 2,0\n100 6.9",
      velocityFactor: "0.8",
      source: "measured",
    };
    expect((await experimenter.post(cables, fields)).status).toBe(302);
    expect((await experimenter.post(cables, fields)).status).toBe(400);
    expect(await textOf(cables)).toContain(name);
    expect((await experimenter.post(cables, { ...fields, name: "LMR-400" })).status).toBe(400);
  });
});

describe("repeats", () => {
  it("are said of two sweeps, seen from both, and parted again", async () => {
    const [one, other] = await Promise.all(
      [send({ bench }), send({ bench })].map(async (a) => (await a).json()),
    );
    const page = `${pageOf(one.id)}/repeats`;
    expect((await experimenter.post(page, { intent: "group" })).status).toBe(400);
    expect((await experimenter.post(page, { intent: "group", sweep: other.id })).status).toBe(302);
    for (const { id } of [one, other]) expect(await textOf(`${pageOf(id)}/repeats`)).toContain("The repeats");
    await experimenter.post(page, { intent: "leave" });
    expect(await textOf(`${pageOf(other.id)}/repeats`)).toContain("is not a repeat of another sweep yet");
  });
});
