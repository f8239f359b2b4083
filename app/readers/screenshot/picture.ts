/** Shapes that flow between the stages of a picture's reading. Pixel centres are at whole numbers. */

/** Raw pixels, row by row from the top left. */
export interface Picture {
  width: number;
  height: number;
  /** Red, green, blue, alpha of each pixel, 0 to 255; length 4 · width · height. */
  data: Uint8Array | Uint8ClampedArray;
}

/** One brightness per pixel, 0 to 255; what the recognition of printed text is given. */
export interface GreyPicture {
  width: number;
  height: number;
  data: Uint8Array;
}

/** Edges in pixels, both ends included. */
export interface Box {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

/** A printed word with its place. `confidence` is 0 to 1. */
export interface Word extends Box {
  text: string;
  confidence: number;
}

/** What is known about the text in a region: scattered words, one line, or a number alone. */
export type TextKind = "scattered" | "line" | "number";

/** Recognises dark text on a light ground; places in pixels of the region. Given by the caller. */
export type Ocr = (region: GreyPicture, kind: TextKind) => Promise<Word[]>;

/** What a stage concluded: how sure it is (0 to 1) and what it saw, in plain words. */
export interface Stage {
  confidence: number;
  saw: string;
}

/** A straight horizontal or vertical stroke or edge. */
export interface Line {
  /** Across the line: row of a horizontal one, column of a vertical one; a fraction of a pixel counts. */
  position: number;
  /** First and last pixel along the line. */
  from: number;
  to: number;
  /** A stroke differs from both sides; an edge is the border of two areas. */
  kind: "stroke" | "edge";
  /** Brightness against its surroundings, 0 to 255, without sign. */
  contrast: number;
}

/** The four bytes of each pixel as one number: equal where the pixels are. Bytes that are not aligned are copied. */
export function pixelsOf({ data, width, height }: Picture): Uint32Array {
  const bytes = data.byteOffset % 4 === 0 ? data : data.slice();
  return new Uint32Array(bytes.buffer, bytes.byteOffset, width * height);
}

/** Brightness of each pixel, 0 to 255, row by row (Rec. 601 weights). */
export function brightness(picture: Picture): Float32Array {
  const { data, width, height } = picture;
  const grey = new Float32Array(width * height);
  for (let i = 0, j = 0; i < grey.length; i++, j += 4) {
    grey[i] = 0.299 * data[j] + 0.587 * data[j + 1] + 0.114 * data[j + 2];
  }
  return grey;
}

/** The same numbers with rows and columns exchanged. */
export function transpose(grey: Float32Array, width: number, height: number): Float32Array {
  const turned = new Float32Array(grey.length);
  const tile = 32;
  for (let y0 = 0; y0 < height; y0 += tile) {
    for (let x0 = 0; x0 < width; x0 += tile) {
      const y1 = Math.min(y0 + tile, height);
      const x1 = Math.min(x0 + tile, width);
      for (let y = y0; y < y1; y++) {
        for (let x = x0; x < x1; x++) turned[x * height + y] = grey[y * width + x];
      }
    }
  }
  return turned;
}
