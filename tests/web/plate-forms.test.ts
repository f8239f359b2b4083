import { beforeAll, describe, expect, it } from "vitest";
import * as plates from "~/db/plates.server";
import { withdraw } from "~/services/plates/withdraw.server";
import { SERVER } from "./browser.ts";
import { freezePlate } from "./in-a-place.ts";
import { type Crew, makeCrew, makePlace } from "./world.ts";

/** The forms of a plate of a private project, asked for by nobody in particular. */

let crew: Crew;
let id: string;
let gone: string;

beforeAll(async () => {
  crew = await makeCrew();
  const place = await makePlace(crew, "private");
  id = await freezePlate(place, crew.owner);
  gone = await freezePlate(place, crew.owner);
  const row = await plates.findByPublicId(gone);
  if (row) await withdraw(row, "The wrong antenna", crew.owner);
});

const ask = (path: string, headers: Record<string, string> = {}) =>
  fetch(`${SERVER}${path}`, { headers, redirect: "manual" });

const FORMS: [ending: string, type: string, begins: string][] = [
  [".svg", "image/svg+xml; charset=utf-8", "<svg "],
  [".svg?theme=dark&width=narrow", "image/svg+xml; charset=utf-8", "<svg "],
  [".png", "image/png", "\x89PNG"],
  [".png?width=2560&theme=dark", "image/png", "\x89PNG"],
  [".pdf", "application/pdf", "%PDF-"],
  [".csv", "text/csv; charset=utf-8; header=present", "frequency_hz,"],
  [".s1p", "text/plain; charset=us-ascii", "! "],
  [".json", "application/json; charset=utf-8", '{"format":"swale-plate/1"'],
  [".bib", "application/x-bibtex; charset=utf-8", "@misc{"],
  [".csl.json", "application/vnd.citationstyles.csl+json; charset=utf-8", "[\n"],
  ["/embed", "text/html; charset=utf-8", "<!DOCTYPE html>"],
];

describe("forms", () => {
  for (const [ending, type, begins] of FORMS) {
    it(`gives ${ending} to anybody, without a cookie, to be kept`, async () => {
      const answer = await ask(`/plates/${id}${ending}`);
      expect(answer.status).toBe(200);
      expect(answer.headers.get("content-type")).toBe(type);
      expect(answer.headers.get("set-cookie")).toBeNull();
      expect(answer.headers.get("cache-control")).toBe("public, max-age=600, stale-if-error=86400");
      expect(answer.headers.get("cross-origin-resource-policy")).toBe("cross-origin");
      expect(answer.headers.get("x-frame-options")).toBeNull();
      const policy = answer.headers.get("content-security-policy");
      expect(policy).toContain("frame-ancestors *");
      if (/^\.svg|embed/.test(ending)) expect(policy).toMatch(/^default-src 'none';/);
      const bytes = Buffer.from(await answer.arrayBuffer());
      expect(bytes.toString("latin1").slice(0, begins.length)).toBe(begins);
      const etag = answer.headers.get("etag") ?? "";
      expect(etag).toMatch(/^"[0-9a-f]{64}(?:-gzip)?"$/);
      const again = await ask(`/plates/${id}${ending}`, { "If-None-Match": `"other", W/${etag}` });
      expect([again.status, (await again.arrayBuffer()).byteLength]).toEqual([304, 0]);
      const head = await fetch(`${SERVER}/plates/${id}${ending}`, { method: "HEAD" });
      expect([head.status, head.headers.get("etag")]).toEqual([200, etag]);
    });
  }

  it("has pictures of the sizes that they are named by", async () => {
    for (const width of [640, 1280, 2560]) {
      const bytes = Buffer.from(await (await ask(`/plates/${id}.png?width=${width}`)).arrayBuffer());
      expect(bytes.readUInt32BE(16)).toBe(width);
    }
  });

  it("sends text packed to who takes it, under a name of its own", async () => {
    const packed = await ask(`/plates/${id}.svg`, { "Accept-Encoding": "gzip" });
    const plain = await ask(`/plates/${id}.svg`, { "Accept-Encoding": "identity" });
    expect([packed.headers.get("content-encoding"), plain.headers.get("content-encoding")]).toEqual([
      "gzip",
      null,
    ]);
    expect(packed.headers.get("etag")).not.toBe(plain.headers.get("etag"));
    expect(packed.headers.get("vary")).toContain("Accept-Encoding");
    expect(await packed.text()).toBe(await plain.text());
  });

  it("answers 404 for what there is not, and 410 with the reason for what was withdrawn", async () => {
    for (const path of [
      `/plates/${id}.png?width=641`,
      `/plates/${id}.svg?theme=red`,
      "/plates/aaaaaaaaaa.svg",
    ])
      expect((await ask(path)).status, path).toBe(404);
    for (const ending of [".svg", ".json", "/embed"]) {
      const answer = await ask(`/plates/${gone}${ending}`);
      expect(answer.status).toBe(410);
      expect(answer.headers.get("cache-control")).toBe("no-cache");
      expect(await answer.text()).toContain("The wrong antenna");
    }
  });
});

describe("the plain address", () => {
  it("gives the form that is asked for, and else the page", async () => {
    const of = async (accept: string) => {
      const answer = await ask(`/plates/${id}`, { Accept: accept });
      expect(answer.headers.get("vary")).toContain("Accept");
      return answer.headers.get("content-type")?.split(";")[0];
    };
    expect(await of("image/svg+xml")).toBe("image/svg+xml");
    expect(await of("image/avif,image/webp,image/png;q=0.8")).toBe("image/png");
    expect(await of("application/pdf, text/html;q=0.1")).toBe("application/pdf");
    expect(await of("text/csv")).toBe("text/csv");
    expect(await of("application/json")).toBe("application/json");
    expect(await of("application/x-bibtex")).toBe("application/x-bibtex");
    expect(await of("application/vnd.citationstyles.csl+json")).toBe(
      "application/vnd.citationstyles.csl+json",
    );
    expect(await of("text/html,application/xhtml+xml,*/*;q=0.8")).toBe("text/html");
    expect(await of("*/*")).toBe("text/html");
  });
});

describe("oEmbed", () => {
  const of = (query: Record<string, string>) => ask(`/oembed?${new URLSearchParams(query)}`);

  it("answers for a plate with a frame that fits", async () => {
    const url = `${SERVER}/plates/${id}`;
    const answer = await of({ url, maxwidth: "400", format: "json" });
    expect([answer.status, answer.headers.get("access-control-allow-origin")]).toEqual([200, "*"]);
    const body = await answer.json();
    expect(body).toMatchObject({ version: "1.0", type: "rich", provider_name: "Swale", width: 400 });
    expect(body.html).toContain(`src="${url}/embed" width="400" height="${body.height}"`);
    const low = await (await of({ url, maxheight: "200" })).json();
    expect(low.height).toBeLessThanOrEqual(200);
  });

  it("has nothing for other addresses, and one format", async () => {
    for (const url of [
      `${SERVER}/plates/aaaaaaaaaa`,
      `https://other.example/plates/${id}`,
      "",
      `${SERVER}/plates/${gone}`,
    ])
      expect((await of({ url })).status, url).toBe(404);
    expect((await of({ url: `${SERVER}/plates/${id}`, format: "xml" })).status).toBe(501);
  });
});
