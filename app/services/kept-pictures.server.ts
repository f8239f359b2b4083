import type { Ocr, Picture } from "../readers/screenshot/picture.ts";
import { decodePicture } from "./picture.server.ts";

/**
 * Decoded pictures of the last few minutes, so that a correction is tried without decoding anew. They are kept in the
 * one thread that tries; the oldest goes when they grow too many.
 */

interface Kept {
  picture: Promise<Picture>;
  usedAt: number;
}

const kept = new Map<string, Kept>();
/** 4 bytes each: 160 MB. */
const MOST_PIXELS = 40_000_000;
const KEEP_MS = 3 * 60 * 1000;

/** The upright pixels of a file, by its SHA-256. Throws `PictureRefused` as `decodePicture`. */
export async function keptPicture(sha256: string, bytes: Uint8Array): Promise<Picture> {
  const known = kept.get(sha256);
  const entry = known ?? { picture: decodePicture(bytes), usedAt: 0 };
  entry.usedAt = Date.now();
  kept.delete(sha256);
  kept.set(sha256, entry);
  try {
    const picture = await entry.picture;
    await letGo(sha256);
    return picture;
  } catch (error) {
    kept.delete(sha256);
    throw error;
  }
}

/** Sees no text: axes that were not given stay unknown, at no cost. */
export const recogniseNothing: Ocr = async () => [];

async function letGo(newest: string): Promise<void> {
  let pixels = 0;
  for (const [sha256, entry] of [...kept].reverse()) {
    const { width, height } = await entry.picture.catch(() => ({ width: 0, height: 0 }));
    pixels += width * height;
    const old = Date.now() - entry.usedAt > KEEP_MS;
    if (sha256 !== newest && (old || pixels > MOST_PIXELS)) kept.delete(sha256);
  }
}
