import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import sharp from "sharp";
import { canvasPainter } from "./canvas.ts";
import { drawWithGnuplot } from "./gnuplot.ts";
import { layOut } from "./layout.ts";
import { inventContent, type Truth } from "./picture.ts";
import { randomFrom } from "./random.ts";
import { sceneToSvg } from "./scene.ts";
import { wear } from "./wear.ts";

/**
 * Makes pictures of invented sweeps with known truth: `tsx scripts/screens/make.ts FOLDER [count] [first number]`.
 *
 * Three drawing programs in turn: SVG drawn by sharp, a canvas in Chromium, gnuplot. The same numbers give
 * the same sweeps and skins; pixels may differ with the versions of the programs.
 */
const [folder = "tests/fixtures/screens/pictures", count = "66", first = "1"] = process.argv.slice(2);
mkdirSync(folder, { recursive: true });
const canvas = await canvasPainter();
try {
  for (let i = 0; i < Number(count); i++) await make(Number(first) + i);
} finally {
  await canvas.close();
}

async function make(number: number): Promise<void> {
  const random = randomFrom(7919 * number);
  const program = (["svg", "canvas", "gnuplot"] as const)[number % 3];
  const name = `${program}-${String(number).padStart(3, "0")}.png`;
  const content = inventContent(random, true);
  let png: Buffer;
  let truth: Truth;
  if (program === "gnuplot") {
    ({ png, truth } = drawWithGnuplot(random, content, name));
  } else {
    const laid = layOut(random, content, name);
    truth = { ...laid.truth, skin: `${program}-${laid.truth.skin}` };
    png =
      program === "svg"
        ? await sharp(Buffer.from(sceneToSvg(laid.scene)))
            .png()
            .toBuffer()
        : await canvas.paint(laid.scene);
  }
  const worn = await wear(png, truth, random);
  writeFileSync(join(folder, worn.truth.file), worn.bytes);
  writeFileSync(join(folder, worn.truth.file.replace(/\.\w+$/, ".json")), `${JSON.stringify(worn.truth)}\n`);
}
