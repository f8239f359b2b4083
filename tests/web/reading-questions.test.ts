import { readFileSync } from "node:fs";
import { beforeAll, expect, it } from "vitest";
import * as sweeps from "~/db/sweeps.server";
import { createProject } from "~/services/projects.server";
import type { Browser } from "./browser.ts";
import { makePerson, signIn, unique } from "./world.ts";

/** A file that leaves two things open is read by two presses, one question each. */

const FILE = new URL("../fixtures/traces/traces-a-b.csv", import.meta.url);
let browser: Browser;
let page: string;

beforeAll(async () => {
  const owner = await makePerson("owner");
  browser = await signIn(owner);
  const about = { title: unique("Questions"), summary: "", visibility: "private" as const, ituRegion: null };
  page = `/projects/${(await createProject(about, owner.id)).publicId}`;
});

async function reading(publicId: string) {
  const found = await sweeps.findByPublicId(publicId);
  if (!found?.reading?.reading) throw new Error("There is no reading.");
  return { problem: found.sweep.problem, ...found.reading.reading };
}

it("keeps the first answer while the second is open, and reads the file with both", async () => {
  const answer = await browser.post(`${page}/sweeps/upload`, {
    files: new File([readFileSync(FILE)], "two questions.csv"),
  });
  const [{ href }] = (await answer.json()).results;
  const publicId = href.split("/").at(-2);
  const before = await reading(publicId);
  expect(before.questions.map(({ id }) => id)).toEqual(["trace", "zero-db"]);
  const other = before.questions[0].choices.find(({ value }) => value !== before.questions[0].proposed);

  const first = await browser.post(href, { answer: `trace=${other?.value}` });
  expect(first.status).toBe(302);
  expect(first.headers.get("Location")).toBe(href);
  const between = await reading(publicId);
  expect(between.problem?.code).toBe("zero-db-needed");
  expect(between.spec.text?.valueColumn).not.toBe(before.spec.text?.valueColumn);

  const last = between.questions.find(({ id }) => id === "zero-db");
  await browser.post(href, { answer: `zero-db=${last?.choices[0].value}` });
  const after = await reading(publicId);
  expect(after.problem).toBeNull();
  expect(after.spec.text?.valueColumn).toBe(between.spec.text?.valueColumn);
});

it("refuses an answer to what was not asked", async () => {
  const text = `Frequency (Hz),S11 (dB)\n${Array.from({ length: 40 }, (_, i) => `${1e6 + i * 1e5},${-1 - i / 100}`).join("\n")}\n`;
  const answer = await browser.post(`${page}/sweeps/upload`, { files: new File([text], "plain.csv") });
  const [{ href }] = (await answer.json()).results;
  const refusal = await browser.post(`${href}/reading`, { answer: "__proto__=1" });
  expect(refusal.status).toBe(400);
  expect((await reading(href.split("/").at(-1))).questions).toEqual([]);
});
