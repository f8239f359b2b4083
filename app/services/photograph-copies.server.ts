import sharp, { type Metadata, type Sharp } from "sharp";
import { MAX_PICTURE_PIXELS } from "./picture.server.ts";

/** A photograph upright and written anew, large and small: its pixels and nothing else. */
export interface PhotographCopies {
  shown: Uint8Array;
  small: Uint8Array;
  /** Pixels of the large copy. */
  width: number;
  height: number;
}

/** A photograph that is not taken, with a sentence for the person who gave it. */
export class PhotographRefused extends Error {}

/**
 * The copies of a JPEG, PNG, WebP or AVIF that pages show, as JPEG: turned upright as its EXIF orientation says, in sRGB, without
 * place, camera or anything else beside the pixels. Throws `PhotographRefused` for anything else.
 */
export async function copiesOf(bytes: Uint8Array): Promise<PhotographCopies> {
  const header = await headerOf(bytes);
  if (header.compression === "hevc") throw new PhotographRefused(HEIC);
  if (!FORMATS.has(header.format ?? "")) throw new PhotographRefused(OTHER);
  if (header.width * header.height > MAX_PICTURE_PIXELS) throw new PhotographRefused(LARGE);
  try {
    const upright = sharp(bytes, { limitInputPixels: MAX_PICTURE_PIXELS, failOn: "error" })
      .autoOrient()
      .flatten({ background: "#ffffff" })
      .toColourspace("srgb");
    const [large, small] = await Promise.all([
      within(upright.clone(), SHOWN_PX, 84),
      within(upright.clone(), SMALL_PX, 78),
    ]);
    return { shown: large.data, small: small.data, width: large.info.width, height: large.info.height };
  } catch {
    throw new PhotographRefused(DAMAGED);
  }
}

async function headerOf(bytes: Uint8Array): Promise<Metadata> {
  try {
    return await sharp(bytes, { limitInputPixels: false }).metadata();
  } catch {
    throw new PhotographRefused(OTHER);
  }
}

function within(picture: Sharp, mostPx: number, quality: number) {
  return picture
    .resize({ width: mostPx, height: mostPx, fit: "inside", withoutEnlargement: true })
    .jpeg({ quality, mozjpeg: true })
    .toBuffer({ resolveWithObject: true });
}

const FORMATS = new Set(["jpeg", "png", "webp", "heif"]);
/** Wider than most screens show a photograph, and well under a megabyte. */
const SHOWN_PX = 2000;
/** Two pixels for each of a tile 320 px wide. */
const SMALL_PX = 640;

const HEIC = "It is a HEIC picture, which can't be decoded here. Save it as JPEG and send that.";
const OTHER = "It is not a picture that can be shown. Give a JPEG, PNG, WebP or AVIF.";
const LARGE = "It has more than 40 megapixels. Give a smaller copy.";
const DAMAGED = "It is damaged or cut short. Save or send it again.";
