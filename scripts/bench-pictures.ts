import { readFileSync } from "node:fs";
import path from "node:path";
import sharp from "sharp";
import { readCorrected } from "../app/readers/screenshot/correct.ts";
import { closePictureReader, decodePicture, readPictureFile } from "../app/services/picture.server.ts";
import { ROOT } from "./install.mjs";
import type { BenchRow } from "./suites/bench-row.ts";

const ROUNDS = 9;
const PICTURE = path.join(ROOT, "tests", "fixtures", "screens", "pictures", "svg-009.png");

/** Reading a picture of 1920 × 1080, as a multiple of decoding it to raw pixels alone. */
export async function benchPictures(): Promise<BenchRow[]> {
  const bytes = await sharp(readFileSync(PICTURE)).resize(1920, 1080, { fit: "fill" }).png().toBuffer();
  const file = { name: "bench.png", bytes };
  const first = await readPictureFile(file);
  const spec = first.reading?.spec.screenshot;
  const corrected = async () => readCorrected(await decodePicture(bytes), async () => [], spec);
  const times = { decoded: [] as number[], corrected: [] as number[], whole: [] as number[] };
  for (let i = -3; i < ROUNDS; i++) {
    const round = [await timed(() => decodePicture(bytes)), await timed(corrected)];
    if (i < 0) continue;
    times.decoded.push(round[0]);
    times.corrected.push(round[1]);
    times.whole.push(await timed(() => readPictureFile(file)));
  }
  await closePictureReader();
  const floor = median(times.decoded);
  return [
    {
      name: "picture of 1920 × 1080, decoded and read without text against decoding",
      value: median(times.corrected) / floor,
      goal: 8,
      unit: "ratio",
    },
    {
      name: "picture of 1920 × 1080, read with its text",
      value: median(times.whole),
      goal: 3000,
      unit: "ms",
    },
  ];
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const started = performance.now();
  await work();
  return performance.now() - started;
}

function median(values: number[]): number {
  return values.sort((a, b) => a - b)[values.length >> 1];
}
