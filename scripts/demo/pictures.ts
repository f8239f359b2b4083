import { readFileSync } from "node:fs";

export type PictureName =
  | "screen-5-25"
  | "screen-46-58"
  | "reed-bank"
  | "stake"
  | "choke"
  | "bridge"
  | "attic";

/** A picture drawn by `pictures/draw.ts` or `pictures/scenes.ts` and kept, so that nothing is needed to draw it. */
export function pictureOf(name: PictureName): Uint8Array {
  return readFileSync(new URL(`./pictures/${name}.png`, import.meta.url));
}
