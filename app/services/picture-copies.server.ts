import sharp from "sharp";
import { detect } from "../readers/detect.ts";
import type { ScreenshotSpec } from "../readers/reading.ts";
import { rectify } from "../readers/screenshot/rectify.ts";
import { decodePicture, MAX_PICTURE_PIXELS } from "./picture.server.ts";

/** What is shown of a picture, and given to those who may not have the original: its pixels and nothing else. */
export interface PictureCopy {
  bytes: Uint8Array;
  contentType: "image/png" | "image/jpeg" | "image/webp";
}

/** True for files of a picture's kind, readable here or not: what they carry besides pixels is not for everybody. */
export function mayCarryPlace(name: string, bytes: Uint8Array): boolean {
  const { kind, what } = detect(name, bytes);
  return kind === "picture" || (kind === "foreign" && /picture|drawing|video/.test(what));
}

/**
 * The picture upright and written anew, so that neither place, camera nor anything else beside the pixels is left.
 * Undefined where it can't be decoded.
 */
export async function strippedCopy(bytes: Uint8Array): Promise<PictureCopy | undefined> {
  const upright = sharp(bytes, { limitInputPixels: MAX_PICTURE_PIXELS, failOn: "error" })
    .autoOrient()
    .toColourspace("srgb");
  try {
    const { format } = await sharp(bytes, { limitInputPixels: MAX_PICTURE_PIXELS }).metadata();
    if (format === "jpeg")
      return { bytes: await upright.jpeg({ quality: 92 }).toBuffer(), contentType: JPEG };
    if (format === "webp")
      return { bytes: await upright.webp({ quality: 92 }).toBuffer(), contentType: WEBP };
    if (format === "png")
      return { bytes: await upright.png({ compressionLevel: 6 }).toBuffer(), contentType: PNG };
  } catch {
    return undefined;
  }
  return undefined;
}

/** The plot of a photograph laid flat by its corners, as the reading saw it. Runs in a worker thread. */
export async function flatPicture({ bytes, spec }: { bytes: Uint8Array; spec: ScreenshotSpec }) {
  const flat = spec.corners ? rectify(await decodePicture(bytes), spec.corners) : null;
  if (!flat) return undefined;
  const { width, height, data } = flat.picture;
  const png = await sharp(Buffer.from(data.buffer), { raw: { width, height, channels: 4 } })
    .png({ compressionLevel: 4 })
    .toBuffer();
  return { bytes: new Uint8Array(png), contentType: PNG } satisfies PictureCopy;
}

const PNG = "image/png";
const JPEG = "image/jpeg";
const WEBP = "image/webp";
