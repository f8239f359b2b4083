import { readFileSync } from "node:fs";

export type PictureName = "screen-5-25" | "screen-46-58";

/** A picture of an invented analyser's screen, drawn by `pictures/draw.ts` and kept, so that no fonts are needed. */
export function pictureOf(name: PictureName): Uint8Array {
  return readFileSync(new URL(`./pictures/${name}.png`, import.meta.url));
}
