import sharp from "sharp";
import { afterAll, describe, expect, it } from "vitest";
import {
  closePictureReader,
  decodePicture,
  PictureRefused,
  readPictureFile,
} from "../../app/services/picture.server.ts";

afterAll(closePictureReader);

const plain = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: "#204060" } });

async function refusal(bytes: Uint8Array): Promise<string> {
  const error = await decodePicture(bytes).catch((e: unknown) => e);
  if (!(error instanceof PictureRefused)) throw new Error("It was decoded.");
  expect(error.message).toMatch(/^[A-Z].*\.$/);
  return error.code;
}

/** A PNG whose header promises a size, with nothing behind it. */
function hollowPng(width: number, height: number): Buffer {
  const chunk = (type: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(type, "latin1"), data]);
    let crc = 0xffffffff;
    for (const byte of body) {
      crc ^= byte;
      for (let k = 0; k < 8; k++) crc = crc & 1 ? (crc >>> 1) ^ 0xedb88320 : crc >>> 1;
    }
    const ends = Buffer.alloc(8);
    ends.writeUInt32BE(data.length, 0);
    ends.writeUInt32BE((crc ^ 0xffffffff) >>> 0, 4);
    return Buffer.concat([ends.subarray(0, 4), body, ends.subarray(4)]);
  };
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 2, 0, 0, 0], 8);
  const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  return Buffer.concat([
    signature,
    chunk("IHDR", header),
    chunk("IDAT", Buffer.from([0x78, 0x9c])),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}

describe("decodePicture", () => {
  it.each(["png", "jpeg", "webp"] as const)("decodes %s to pixels with alpha", async (format) => {
    const picture = await decodePicture(await plain(20, 10).toFormat(format, { lossless: true }).toBuffer());
    expect([picture.width, picture.height, picture.data.length]).toEqual([20, 10, 800]);
    expect(Math.abs(picture.data[2] - 0x60)).toBeLessThan(6);
    expect(picture.data[3]).toBe(255);
  });

  it("turns a photograph upright by its EXIF orientation", async () => {
    const bytes = await plain(20, 10).jpeg().withMetadata({ orientation: 6 }).toBuffer();
    expect(await decodePicture(bytes)).toMatchObject({ width: 10, height: 20 });
  });

  it("lays transparent pixels on white", async () => {
    const bytes = await sharp({
      create: { width: 4, height: 4, channels: 4, background: { r: 0, g: 0, b: 0, alpha: 0 } },
    })
      .png()
      .toBuffer();
    expect([...(await decodePicture(bytes)).data.subarray(0, 4)]).toEqual([255, 255, 255, 255]);
  });

  it("refuses an animated picture", async () => {
    const raw = Buffer.concat([Buffer.alloc(8 * 8 * 3, 10), Buffer.alloc(8 * 8 * 3, 200)]);
    const bytes = await sharp(raw, { raw: { width: 8, height: 16, channels: 3, pageHeight: 8 } })
      .webp({ loop: 0, delay: [50, 50] })
      .toBuffer();
    expect(await refusal(bytes)).toBe("animated");
  });

  it("refuses an SVG with a script in it", async () => {
    const svg =
      '<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"><script>alert(1)</script></svg>';
    expect(await refusal(Buffer.from(svg))).toBe("picture-format");
  });

  it("refuses 200 megapixels by the header, without decoding them", async () => {
    const before = process.memoryUsage().rss;
    expect(await refusal(hollowPng(20_000, 10_000))).toBe("too-large");
    expect(process.memoryUsage().rss - before).toBeLessThan(64 * 2 ** 20);
  });

  it("refuses a picture that is cut short, and bytes that are no picture", async () => {
    const whole = await plain(300, 200).png({ compressionLevel: 0 }).toBuffer();
    expect(await refusal(whole.subarray(0, whole.length / 2))).toBe("damaged");
    const noise = sharp(Buffer.from(Array.from({ length: 300 * 200 * 3 }, (_, i) => (i * i * 7) % 251)), {
      raw: { width: 300, height: 200, channels: 3 },
    });
    const photograph = await noise.jpeg().toBuffer();
    expect(await refusal(photograph.subarray(0, photograph.length / 2))).toBe("damaged");
    expect(await refusal(Buffer.from("MHz,dB\n1,2\n"))).toBe("not-a-picture");
    expect(await refusal(Buffer.alloc(0))).toBe("not-a-picture");
  });
});

describe("readPictureFile", () => {
  it("gives a refusal as a problem", async () => {
    const result = await readPictureFile({ name: "x.png", bytes: Buffer.from("no picture") });
    expect(result.ok ? "" : result.problem.code).toBe("not-a-picture");
  });

  it("says that there is no plot in a picture without one", async () => {
    const result = await readPictureFile({ name: "x.png", bytes: await plain(640, 480).png().toBuffer() });
    expect(result.ok ? "" : result.problem.code).toBe("no-frame");
  });
});
