import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import sharp from "sharp";
import { afterAll, describe, expect, it } from "vitest";
import {
  closePictureReader,
  decodePicture,
  PictureRefused,
  readPictureFile,
} from "../../app/services/picture.server.ts";

/**
 * Pictures of every PNG colour type and depth by Willem van Schaik, whose terms (README beside them) allow use,
 * copying and distribution for any purpose without fee. Taken unchanged from the copy of a Debian source package.
 */
const FOLDER = new URL("../fixtures/pngsuite/", import.meta.url).pathname;
const NAMES = readdirSync(FOLDER).filter((name) => name.endsWith(".png"));
const ONE_SENTENCE_OR_TWO = /^[A-Z][^.]+\.( [A-Z][^.]+\.)*$/;

afterAll(closePictureReader);

/** Width and height as the header chunk says them (PNG specification, 11.2.1 IHDR). */
function headerSize(bytes: Buffer): { width: number; height: number } {
  return { width: bytes.readUInt32BE(16), height: bytes.readUInt32BE(20) };
}

describe("the PngSuite pictures", () => {
  it("are there, with every colour type and depth", () => {
    const kinds = new Set(NAMES.map((name) => name.slice(4, 8)));
    for (const kind of ["0g01", "0g02", "0g04", "0g08", "0g16", "2c08", "2c16", "3p01", "3p02", "3p04"])
      expect(kinds).toContain(kind);
    for (const kind of ["3p08", "4a08", "4a16", "6a08", "6a16"]) expect(kinds).toContain(kind);
  });

  it.each(NAMES)("%s is decoded", async (name) => {
    const bytes = readFileSync(join(FOLDER, name));
    const picture = await decodePicture(bytes);
    expect({ width: picture.width, height: picture.height }).toEqual(headerSize(bytes));
    expect(picture.data).toHaveLength(4 * picture.width * picture.height);
    for (let i = 3; i < picture.data.length; i += 4)
      if (picture.data[i] !== 255) expect.fail(`alpha at ${i}`);
    // White strokes on a transparent ground are lost on white paper; the opaque ones all show something.
    if (name.startsWith("basn"))
      expect(new Set(picture.data.filter((_, i) => i % 4 < 3)).size).toBeGreaterThan(1);
  });

  it.each(NAMES)("%s is refused when it is cut short", async (name) => {
    const bytes = readFileSync(join(FOLDER, name));
    const refused = await decodePicture(bytes.subarray(0, bytes.length >> 1)).catch((error) => error);
    expect(refused).toBeInstanceOf(PictureRefused);
    expect(refused.message).toMatch(ONE_SENTENCE_OR_TWO);
  });

  it.each(NAMES)("%s holds no plot, and neither does it enlarged", { timeout: 60_000 }, async (name) => {
    const bytes = readFileSync(join(FOLDER, name));
    const large = await sharp(bytes).resize(320, 320, { kernel: "nearest", fit: "fill" }).png().toBuffer();
    for (const given of [bytes, large]) {
      const result = await readPictureFile({ name, bytes: given });
      if (result.ok) expect.fail(`${name} was read as a sweep`);
      expect(result.problem.message).toMatch(ONE_SENTENCE_OR_TWO);
    }
  });
});
