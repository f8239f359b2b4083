import { execFileSync } from "node:child_process";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { expect, it } from "vitest";
import { db } from "~/db/client.server";
import * as people from "~/db/people.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import * as webmentions from "~/db/webmentions.server";
import { NO_ANTENNA } from "~/measurement/antenna";
import { NO_TOKEN } from "~/routes/api/guide/components/Rules";
import type { Example } from "~/routes/api/guide/example";
import { EXAMPLE_GROUPS, filledIn, keyOf } from "~/routes/api/guide/examples";
import { componentOf } from "~/routes/api/openapi-parts";
import { changeAntenna } from "~/services/antennas.server";
import { createProject } from "~/services/projects.server";
import { askApi, SERVER } from "./browser.ts";
import { makeBench, makePerson, type Someone, tokenOf } from "./world.ts";

/** Runs every worked example of the guide, one after another, as somebody new would. */

const ANSWERS = new URL("../../app/routes/api/guide/example-answers.json", import.meta.url);
const examples = EXAMPLE_GROUPS.flatMap((group) => group.examples);
/** Real → shown. */
const ids = new Map<string, string>();
/** What answers were saved as. */
const saved = new Map<string, Blob>();

it("answers as the guide says, in the shapes of the OpenAPI document", { timeout: 120_000 }, async () => {
  const person = await makePerson("ada");
  await people.update(person.id, { name: "Ada Marsh" });
  const project = await makeExperiment(person);
  const token = await tokenOf(person);
  const document = await (await askApi("/openapi.json", null)).json();
  const operations = operationsOf(document);
  const kept: Record<string, string> = { origin: SERVER };
  const answers: Record<string, unknown> = {};
  for (const example of examples) {
    const { method, path, status, schema } = operations[example.operation];
    await before[example.operation]?.(kept);
    const filled = filledIn(example, kept);
    const [asked] = `${example.open ? "" : "/api/v1"}${filled.path}`.split("?");
    expect(asked).toMatch(new RegExp(`^${path.replaceAll(".", "\\.").replace(/\{\w+\}/g, "\\w+")}$`));
    const response = await ask(filled, token, method);
    const first = await bodyOfAnswer(response, example);
    expect([example.operation, response.status, first]).toEqual([example.operation, status, first]);
    const answer = await settled(first, example.until, token);
    // A member that the document does not know would be left out here.
    if (schema && typeof answer !== "string")
      expect(componentOf(schema).parse(answer), example.operation).toEqual(answer);
    for (const [name, where] of Object.entries(example.keep ?? {})) {
      kept[name] = where.split(".").reduce((at, key) => at?.[key], answer);
      expect(kept[name], `${example.operation}: ${where}`).toBeTypeOf("string");
    }
    answers[keyOf(example)] = shown(answer, person, project);
  }
  if (process.env.EXAMPLES === "write") {
    writeFileSync(ANSWERS, JSON.stringify(answers));
    execFileSync("npx", ["biome", "format", "--write", ANSWERS.pathname], { stdio: "ignore" });
  }
  expect(existsSync(ANSWERS)).toBe(true);
  const told = "after a change that is meant, run this file with EXAMPLES=write";
  expect(answers, told).toEqual(JSON.parse(readFileSync(ANSWERS, "utf8")));
});

it("leaves no operation without an example", async () => {
  const document = await (await askApi("/openapi.json", null)).json();
  const { getOpenApi: _, ...operations } = operationsOf(document);
  expect([...new Set(examples.map(({ operation }) => operation))].sort()).toEqual(
    Object.keys(operations).sort(),
  );
});

it("says what a call without a token is answered with", async () => {
  const answer = await (await askApi("/projects", null)).json();
  expect(JSON.parse(NO_TOKEN)).toEqual(answer);
});

async function makeExperiment(person: Someone) {
  const about = { title: "A vertical on the reed bank", summary: "Invented.", ituRegion: 1 } as const;
  const made = await createProject({ ...about, visibility: "linked" }, person.id);
  const band = { name: "40 m", lowHz: 7_000_000, highHz: 7_200_000, swrLimit: 2 };
  await projects.replaceDesignBands(made.id, [band], db);
  await makeBench(made, person, "Bridge in the shed");
  const element = { heightM: 0, diameterMm: null, material: "copper", insulated: null, where: "" };
  await changeAntenna({
    projectId: made.id,
    by: person.id,
    was: NO_ANTENNA,
    wanted: {
      ...NO_ANTENNA,
      elements: [
        { ...element, key: "pole", kind: "vertical", name: "Reed pole", lengthM: 10.2, count: 1 },
        { ...element, key: "radials", kind: "radial", name: "Radials", lengthM: 8, count: 4 },
      ],
    },
    validFrom: new Date("2026-05-01T00:00Z"),
    remark: "As it was put up",
  });
  return made;
}

// biome-ignore lint/suspicious/noExplicitAny: whatever an example is answered with
type Answer = any;

interface Asked {
  method: string;
  path: string;
  status: number;
  /** Undefined where it answers no JSON. */
  schema: Parameters<typeof componentOf>[0] | undefined;
}

interface Document {
  paths: Record<string, Record<string, { operationId: string; responses: Record<string, Answered> }>>;
}
type Answered = { content?: { "application/json"?: { schema?: { $ref: string } } } };

function operationsOf(document: Document): Record<string, Asked> {
  const found: Record<string, Asked> = {};
  for (const [path, item] of Object.entries(document.paths)) {
    for (const [method, { operationId, responses }] of Object.entries(item)) {
      const [status] = Object.keys(responses).filter((code) => code.startsWith("2"));
      const reference = responses[status].content?.["application/json"]?.schema?.$ref;
      const schema = reference?.replace("#/components/schemas/", "") as Asked["schema"];
      found[operationId] = { method: method.toUpperCase(), path, status: Number(status), schema };
    }
  }
  return found;
}

/** JSON as it is; of anything else what it is, with its bytes kept where the example saves them. */
async function bodyOfAnswer(response: Response, { saves }: Example): Promise<Answer> {
  const type = response.headers.get("Content-Type") ?? "";
  if (/^application\/(problem\+)?json\b/.test(type)) return response.json();
  const bytes = await response.blob();
  if (saves) saved.set(saves, bytes);
  return bytes.size > 0 ? `${type.split(";")[0]}, saved as ${saves}` : "Nothing";
}

/** The answer once what goes on behind it is done. */
async function settled(first: Answer, until: Example["until"], token: string): Promise<Answer> {
  let answer = first;
  while (until && answer[until.where] !== until.is) {
    expect(answer[until.where], JSON.stringify(answer)).not.toBe("failed");
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
    answer = await (await askApi(answer.links.self.replace("/api/v1", ""), token)).json();
  }
  return answer;
}

/** What an example needs that only somebody elsewhere can do. */
const before: Record<string, (kept: Record<string, string>) => Promise<void>> = {
  async listMentions({ plate }) {
    const of = { plateId: (await plates.findByPublicId(plate))?.id ?? 0, writeUpId: null };
    const page = { source: "https://notes.example/reeds", target: `${SERVER}/plates/${plate}` };
    const id = await webmentions.receive({ ...page, ...of }, db);
    const found = await webmentions.findByPublicId(id);
    const checked = { state: "verified", title: "Reeds and radials", checkedAt: new Date() } as const;
    await webmentions.update(found?.mention.id ?? 0, checked);
  },
};

function ask(example: Example, token: string, method: string): Promise<Response> {
  const body = bodyOf(example);
  const headers = new Headers(body.headers);
  if (example.accept) headers.set("Accept", example.accept);
  const init = { method, ...body, headers };
  return example.open ? fetch(SERVER + example.path, init) : askApi(example.path, token, init);
}

function bodyOf({ json, file, files, form, fields = {} }: Example): RequestInit {
  if (form) return { body: new URLSearchParams(form) };
  if (json !== undefined) {
    return { body: JSON.stringify(json), headers: { "Content-Type": "application/json" } };
  }
  if (!file && !files) return {};
  const body = new FormData();
  if (file) body.set("file", new File([file.text], file.name));
  for (const [name, value] of Object.entries(file?.fields ?? fields)) body.set(name, value);
  for (const { field, name, text } of files ?? []) {
    const content = text ?? saved.get(name);
    if (content === undefined) throw new Error(`No answer was saved as ${name}.`);
    body.append(field, new File([content], name));
  }
  return { body };
}

/** What differs from run to run is written as the guide shows it; long lists are cut. */
function shown(answer: unknown, person: Someone, project: { publicId: string }): unknown {
  idOf(project.publicId);
  collectIds(answer);
  let text = JSON.stringify(answer)
    .replaceAll(person.userName, "ada-marsh")
    .replaceAll(SERVER, "https://swale.example");
  for (const [real, told] of ids) text = text.replaceAll(real, told);
  return tidied(JSON.parse(text));
}

function collectIds(value: unknown): void {
  if (typeof value === "string" && PUBLIC_ID.test(value) && /\d/.test(value)) idOf(value);
  else if (value && typeof value === "object") {
    for (const [key, one] of Object.entries(value)) {
      if (typeof one === "string" && ID_KEYS.test(key) && PUBLIC_ID.test(one)) idOf(one);
      else collectIds(one);
    }
  }
}

function idOf(real: string): string {
  const known = ids.get(real);
  if (known) return known;
  const n = SAMPLE_LETTERS.length;
  const told = `${SAMPLE_LETTERS[ids.size % n]}${FIRST_DIGIT - Math.floor(ids.size / n)}fenmarsh`;
  ids.set(real, told);
  return told;
}

function tidied(value: unknown): unknown {
  if (typeof value === "string") {
    if (OF_DAY.test(value)) return value.replace(OF_DAY, "-2026-05-04.zip");
    if (ISO.test(value) && Math.abs(Date.now() - Date.parse(value)) < DAY_MS)
      return "2026-05-04T18:00:00.000Z";
    return value;
  }
  if (typeof value === "number") return Number(value.toPrecision(DIGITS));
  if (Array.isArray(value)) {
    const first = value.slice(0, MOST_SHOWN).map(tidied);
    return value.length > MOST_SHOWN + 1
      ? [...first, `… and ${value.length - MOST_SHOWN} more`]
      : value.map(tidied);
  }
  if (value === null || typeof value !== "object") return value;
  const entries = Object.entries(value);
  return Object.fromEntries(
    entries.map(([key, one]) => [key, typeof one === typeof OTHERWISE[key] ? OTHERWISE[key] : tidied(one)]),
  );
}

const PUBLIC_ID = /^[2-9a-hjkmnp-z]{10}$/;
const ID_KEYS = /^(?:id|project|sweep|dip|step|trail|bench|plate|writeUp|reference)$/;
/** One for each id that the examples meet, then with the digit below. */
const FIRST_DIGIT = 7;
const SAMPLE_LETTERS = "abcdefghjkmnpqrstuvwxyz";
const ISO = /^\d{4}-\d\d-\d\dT[\d:.]+Z$/;
const DAY_MS = 86_400_000;
const LOOK_EVERY_MS = 200;
/** What is another each time, made of ids, packed, or days ahead; or with every new example: what a bundle holds. */
const OTHERWISE: Record<string, unknown> = {
  revision: "3f9a61c07be2d4458a1e",
  sizeBytes: 61_440,
  files: 103,
  records: 62,
  until: "2026-05-11T18:00:00.000Z",
};
const OF_DAY = /-\d{4}-\d\d-\d\d\.zip$/;
const MOST_SHOWN = 4;
/** Enough to read, and the same on every machine. */
const DIGITS = 8;
