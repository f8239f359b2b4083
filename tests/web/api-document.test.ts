import { beforeAll, describe, expect, it } from "vitest";
import { askForBundle } from "~/services/bundle/runs.server";
import { askApi, SERVER } from "./browser.ts";
import { freezePlate, waitingMention } from "./in-a-place.ts";
import { type Crew, makeCrew, makePlace, type Place, tokenOf } from "./world.ts";

/** Walks the OpenAPI document: what it says of every GET is held against what the server answers. */

/** Three seconds of asking; a machine with much else to do needs longer. */
const LONG = { timeout: 120_000 };

interface Said {
  $ref?: string;
  content?: Record<string, unknown>;
}
interface Get {
  security?: [];
  responses: Record<string, Said>;
}

let crew: Crew;
let place: Place;
let token: string;
let paths: Record<string, { get?: Get }>;

beforeAll(async () => {
  crew = await makeCrew();
  const made = await makePlace(crew, "public");
  const plate = await freezePlate(made, crew.owner);
  const mention = await waitingMention(made);
  const bundle = (await askForBundle(made.projectId, crew.owner.id)).run.publicId;
  place = { ...made, plate, mention, bundle };
  token = await tokenOf(crew.owner);
  paths = (await (await askApi("/openapi.json", null)).json()).paths;
});

describe("every GET of the document", () => {
  it("is answered for what is there with a status and a type that it names", LONG, async () => {
    const seen = await walk((name) => String(place[name as keyof Place] || "nothing"));
    expect(seen.length).toBeGreaterThan(40);
    // What waits for work behind it, and what has a question to be asked, may say so; nothing else is refused.
    const refused = seen.filter(({ status }) => status >= 400).map(({ path }) => path);
    const may = ["/api/v1/bundles/{bundle}/file", "/api/v1/projects/{project}/compare"];
    expect(may).toEqual(expect.arrayContaining(refused));
  });

  it("is answered so for what is not there too", LONG, async () => {
    const seen = await walk(() => "aaaaaaaaaa");
    const found = seen.filter(({ path, status }) => path.includes("{") && status !== 404);
    expect(found).toEqual([]);
  });
});

async function walk(fill: (name: string) => string) {
  const seen: { path: string; status: number }[] = [];
  for (const [path, { get }] of Object.entries(paths)) {
    if (!get) continue;
    const address = path.replace(/\{(\w+)\}/g, (_, name) => fill(name));
    const question = path === "/oembed" ? `?url=${SERVER}/plates/${fill("plate")}` : "";
    const headers: Record<string, string> = get.security ? {} : { Authorization: `Bearer ${token}` };
    const answer = await fetch(SERVER + address + question, { headers, redirect: "manual" });
    const bytes = (await answer.arrayBuffer()).byteLength;
    const said = get.responses[answer.status];
    expect(said, `${path}: ${answer.status}`).toBeDefined();
    const type = (answer.headers.get("Content-Type") ?? "").split(";")[0];
    if (bytes > 0) expect(typesOf(said), `${path}: ${answer.status}`).toContain(type);
    seen.push({ path, status: answer.status });
  }
  return seen;
}

function typesOf({ $ref, content }: Said): string[] {
  return $ref?.endsWith("/Problem") ? ["application/problem+json"] : Object.keys(content ?? {});
}
