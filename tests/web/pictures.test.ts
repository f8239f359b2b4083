import sharp from "sharp";
import { beforeAll, describe, expect, it } from "vitest";
import { drawnScreen, PLOT } from "../drawn-screen.ts";
import { askApi, Browser } from "./browser.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn, tokenOf, unique } from "./world.ts";

/** An invented photograph that says where it was taken, with what, and that it lies on its side. */
async function telltale(salt: string): Promise<Buffer> {
  return sharp(await drawnScreen({ salt, dipMHz: 12.3 }))
    .rotate(270)
    .withMetadata({ orientation: 6 })
    .withExifMerge({
      IFD0: { Make: "Fennmarsh", Model: "Reed 1" },
      IFD3: {
        GPSLatitudeRef: "N",
        GPSLatitude: "51/1 30/1 0/1",
        GPSLongitudeRef: "W",
        GPSLongitude: "0/1 7/1 0/1",
      },
    })
    .jpeg({ quality: 95 })
    .toBuffer();
}

let crew: Crew;
let place: Place;
let bytes: Buffer;
let sweep: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "public", true);
  bytes = await telltale(unique("shed"));
  const events = await sendPicture(await signIn(crew.experimenter), bytes, "shed photo.jpg");
  sweep = /sweeps\/([^/]+)/.exec(events.at(-1)?.results?.[0].href ?? "")?.[1] ?? "";
  expect(sweep).not.toBe("");
});

interface UploadEvent {
  stage?: string;
  results?: { kind: string; href: string | null; message: string }[];
}

async function sendPicture(browser: Browser, picture: Uint8Array, name: string): Promise<UploadEvent[]> {
  const files = new File([new Uint8Array(picture)], name);
  const answer = await browser.post(
    `/projects/${place.project}/sweeps/upload`,
    { files },
    { Accept: "application/x-ndjson, application/json" },
  );
  expect(answer.headers.get("Content-Type")).toContain("application/x-ndjson");
  return (await answer.text())
    .trim()
    .split("\n")
    .map((line) => JSON.parse(line));
}

const bytesOf = async (response: Response) => Buffer.from(await response.arrayBuffer());
const at = (name: string) => `/projects/${place.project}/sweeps/${sweep}${name && `/${name}`}`;

describe("what a picture says besides its pixels", () => {
  it("was there", async () => {
    const { exif, orientation } = await sharp(bytes).metadata();
    expect(orientation).toBe(6);
    expect(exif?.includes(Buffer.from("Fennmarsh"))).toBe(true);
  });

  it.each(["owner", "experimenter"] as const)("is in the original that an %s gets", async (role) => {
    const answer = await (await signIn(crew[role])).get(at("original"));
    expect((await bytesOf(answer)).equals(bytes)).toBe(true);
  });

  it.each(["commenter", "reader", "visitor"] as const)("is not in what a %s gets", async (role) => {
    const browser = role === "visitor" ? new Browser() : await signIn(crew[role]);
    for (const name of ["original", "picture", "picture?flat"]) {
      const answer = await browser.get(at(name));
      expect(answer.status).toBe(200);
      const copy = await bytesOf(answer);
      const { exif, iptc, xmp, orientation, width, height } = await sharp(copy).metadata();
      expect({ exif, iptc, xmp, orientation }).toEqual({});
      expect([width, height]).toEqual([PLOT.width, PLOT.height]);
      expect(copy.includes(Buffer.from("Fennmarsh"))).toBe(false);
    }
  });

  it("is not in the picture that is shown to anybody", async () => {
    const answer = await (await signIn(crew.owner)).get(at("picture"));
    expect(answer.headers.get("Content-Type")).toBe("image/jpeg");
    expect((await sharp(await bytesOf(answer)).metadata()).exif).toBeUndefined();
    const tag = answer.headers.get("ETag") ?? "";
    expect((await (await signIn(crew.owner)).get(at("picture"), { "If-None-Match": tag })).status).toBe(304);
  });

  it("is told of on the page", async () => {
    const owner = await (await (await signIn(crew.owner)).get(at(""))).text();
    expect(owner).toContain("The untouched original is for owners and experimenters only");
    const reader = await (await new Browser().get(at(""))).text();
    expect(reader).toContain("given without place and camera data");
  });
});

describe("sending a picture", () => {
  it("is answered stage by stage, then with what became of it", async () => {
    const events = await sendPicture(
      await signIn(crew.owner),
      await drawnScreen({ salt: unique("stage") }),
      "stages.png",
    );
    expect(events.slice(0, 4).map((event) => event.stage)).toEqual(["decoded", "frame", "axes", "trace"]);
    expect(events.at(-1)?.results?.[0]).toMatchObject({ kind: "read" });
    expect(events.at(-1)?.results?.[0].message).toMatch(/Read from a picture, half a pixel being 13\skHz/);
  });

  it("works as a plain form too", async () => {
    const files = new File(
      [new Uint8Array(await drawnScreen({ salt: unique("plain"), bare: true }))],
      "plain.png",
    );
    const answer = await (await signIn(crew.owner)).post(`/projects/${place.project}/sweeps/new`, { files });
    const page = await answer.text();
    expect(page).toContain("The axes could not be read");
    const reading = /href="([^"]+\/reading)"/.exec(page)?.[1] ?? "";
    const form = await (await (await signIn(crew.owner)).get(reading)).text();
    expect(form).toContain("not found: give it");
    const fields = { ...fieldsIn(form), start: "5", stop: "25,0", top: "0", bottom: "-40" };
    const kept = await (await signIn(crew.owner)).post(reading, { ...fields, intent: "read" });
    expect(kept.status).toBe(302);
    const sweepPage = await (await (await signIn(crew.owner)).get(kept.headers.get("Location") ?? "")).text();
    expect(sweepPage).toContain("14.2");
  });

  it("through the interface for scripts gives a sweep or a clear problem", async () => {
    const token = await tokenOf(crew.experimenter);
    const send = async (picture: Uint8Array) => {
      const form = new FormData();
      form.set("file", new File([new Uint8Array(picture)], "api.png"));
      return askApi(`/projects/${place.project}/sweeps`, token, { method: "POST", body: form });
    };
    const good = await send(await drawnScreen({ salt: unique("api") }));
    expect(good.status).toBe(201);
    expect((await good.json()).dips).toHaveLength(1);
    const bare = await send(await drawnScreen({ salt: unique("bare"), bare: true }));
    expect(bare.status).toBe(422);
    expect((await bare.json()).code).toBe("axes-needed");
  });
});

/** What a browser without scripts would send of the reading's form. */
function fieldsIn(html: string): Record<string, string> {
  const form = /<form[^>]*aria-label="How the picture is read"[\s\S]*?<\/form>/.exec(html)?.[0] ?? "";
  const fields: Record<string, string> = {};
  for (const [tag] of form.matchAll(/<input[^>]*>/g)) {
    const name = /name="([^"]+)"/.exec(tag)?.[1];
    if (name && (!tag.includes('type="radio"') || tag.includes("checked")))
      fields[name] = /value="([^"]*)"/.exec(tag)?.[1] ?? "";
  }
  for (const [, name, options] of form.matchAll(/<select[^>]*name="([^"]+)"[^>]*>([\s\S]*?)<\/select>/g)) {
    const chosen =
      /<option value="([^"]*)" selected/.exec(options) ??
      /<option[^>]*selected[^>]*value="([^"]*)"/.exec(options);
    fields[name] = chosen?.[1] ?? /value="([^"]*)"/.exec(options)?.[1] ?? "";
  }
  fields.masked = "";
  return fields;
}
