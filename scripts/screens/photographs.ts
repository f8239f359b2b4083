import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import sharp from "sharp";
import { cornersOf } from "../../app/readers/screenshot/rectify.ts";
import { type Camera, type Place, standBefore } from "./camera.ts";
import type { Truth } from "./picture.ts";
import { type Random, randomFrom } from "./random.ts";
import { truthsIn } from "./score.ts";

/**
 * Makes photographs of the screens among the fixtures: `tsx scripts/screens/photographs.ts [FOLDER] [SCREENS]`.
 *
 * Every screen that is not worn already (nothing is chosen by how well it is read) stands on a table, seen by a
 * pinhole camera at an angle, under unequal light with a reflection, with moiré, blur, noise and JPEG. The same
 * screens give the same pixels; the bytes may differ with the version of the JPEG encoder.
 */
export interface PhotographTruth extends Truth {
  /** Corners of the plot in the photograph, top left first, clockwise; `plot` is its place on the flat screen. */
  corners: Place[];
}

const PHOTO = { width: 960, height: 720 };
/** Samples a side for each pixel. */
const SAMPLES = 3;
const QUALITY = 82;

export async function photograph(
  screenPng: Uint8Array,
  truth: Truth,
  random: Random,
): Promise<{ jpeg: Buffer; truth: PhotographTruth }> {
  const { data, info } = await sharp(screenPng)
    .flatten({ background: "#ffffff" })
    .toColourspace("srgb")
    .removeAlpha()
    .raw()
    .toBuffer({ resolveWithObject: true });
  const screen = { width: info.width, height: info.height, border: Math.round(0.05 * info.width), data };
  const pose = { yaw: random.between(-24, 24), pitch: random.between(-18, 18), roll: random.between(-6, 6) };
  const camera = standBefore(screen, PHOTO, pose);
  const seen = Buffer.from(expose(screen, camera, lighting(random)));
  const blurred = await sharp(seen, { raw: { ...PHOTO, channels: 3 } })
    .blur(random.between(0.5, 0.9))
    .raw()
    .toBuffer();
  const grain = random.between(1, 3);
  for (let i = 0; i < blurred.length; i++) {
    const noise = random.next() + random.next() + random.next() - 1.5;
    blurred[i] = Math.min(255, Math.max(0, Math.round(blurred[i] + 2 * grain * noise)));
  }
  const jpeg = await sharp(blurred, { raw: { ...PHOTO, channels: 3 } })
    .jpeg({ quality: QUALITY })
    .toBuffer();
  const corners = cornersOf(truth.plot).map((corner) => {
    const { x, y } = camera.toPhoto(corner);
    return { x: Number(x.toFixed(3)), y: Number(y.toFixed(3)) };
  });
  const file = truth.file.replace(/\.\w+$/, ".jpg");
  return {
    jpeg,
    truth: { ...truth, file, size: [PHOTO.width, PHOTO.height], degraded: ["photograph"], corners },
  };
}

interface Screen {
  width: number;
  height: number;
  border: number;
  data: Buffer;
}

/** Factor and addend of one colour channel at a place of the photograph; the moiré only on the screen. */
interface Lighting {
  table: [number, number, number];
  gain: (x: number, y: number) => number;
  glow: (x: number, y: number) => number;
  moire: (x: number, y: number, channel: number) => number;
}

function lighting(random: Random): Lighting {
  const { width, height } = PHOTO;
  const across = random.between(-0.4, 0.4);
  const down = random.between(-0.3, 0.3);
  const corner = random.between(0.1, 0.3);
  const spot = { x: random.between(0, width), y: random.between(0, height), bright: random.between(8, 40) };
  const reach = random.between(0.15, 0.3) * width;
  const waves = [0, 1, 2].map(() => ({
    x: random.between(-0.12, 0.12),
    y: random.between(-0.12, 0.12),
    phase: random.between(0, 6.28),
  }));
  const depth = random.between(0.01, 0.05);
  return {
    table: [random.whole(70, 160), random.whole(60, 130), random.whole(40, 110)],
    gain: (x, y) => {
      const u = x / width - 0.5;
      const v = y / height - 0.5;
      return 0.92 + across * u + down * v - corner * 2 * (u * u + v * v);
    },
    glow: (x, y) => spot.bright * Math.exp(-((x - spot.x) ** 2 + (y - spot.y) ** 2) / (2 * reach ** 2)),
    moire: (x, y, channel) => {
      const { x: kx, y: ky, phase } = waves[channel];
      const bend = 0.00004 * (x - width / 2) * (y - height / 2);
      return 1 + depth * Math.sin(2 * Math.PI * (kx * x + ky * y + bend) + phase);
    },
  };
}

function expose(screen: Screen, camera: Camera, light: Lighting): Uint8ClampedArray {
  const { width, height } = PHOTO;
  const out = new Uint8ClampedArray(3 * width * height);
  const sum = new Float64Array(3);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      sum.fill(0);
      let onScreen = 0;
      for (let i = 0; i < SAMPLES * SAMPLES; i++) {
        const at = camera.toScreen({
          x: x + ((i % SAMPLES) + 0.5) / SAMPLES - 0.5,
          y: y + (Math.floor(i / SAMPLES) + 0.5) / SAMPLES - 0.5,
        });
        onScreen += addColor(screen, at, light.table, sum);
      }
      const samples = SAMPLES * SAMPLES;
      const gain = light.gain(x, y);
      const glow = light.glow(x, y);
      for (let c = 0; c < 3; c++) {
        const moire = 1 + (light.moire(x, y, c) - 1) * (onScreen / samples);
        out[3 * (y * width + x) + c] = (sum[c] / samples) * gain * moire + glow;
      }
    }
  }
  return out;
}

/** Adds the screen's colour (bilinear), its dark border's or the table's; 1 where it is the screen's. */
function addColor(screen: Screen, { x, y }: Place, table: number[], sum: Float64Array): number {
  const { width, height, border, data } = screen;
  if (x < -0.5 || y < -0.5 || x > width - 0.5 || y > height - 0.5) {
    const inBorder = x > -border && y > -border && x < width + border && y < height + border;
    const grain = 1 + 0.08 * Math.sin(x / 37 + 3 * Math.sin(y / 90)) * Math.sin(y / 11);
    for (let c = 0; c < 3; c++) sum[c] += inBorder ? 26 + 4 * c : table[c] * grain;
    return 0;
  }
  const x0 = Math.min(width - 2, Math.max(0, Math.floor(x)));
  const y0 = Math.min(height - 2, Math.max(0, Math.floor(y)));
  const dx = Math.min(1, Math.max(0, x - x0));
  const dy = Math.min(1, Math.max(0, y - y0));
  const at = 3 * (y0 * width + x0);
  const below = at + 3 * width;
  for (let c = 0; c < 3; c++) {
    const upper = data[at + c] * (1 - dx) + data[at + 3 + c] * dx;
    const lower = data[below + c] * (1 - dx) + data[below + 3 + c] * dx;
    sum[c] += upper * (1 - dy) + lower * dy;
  }
  return 1;
}

if (process.argv[1] === import.meta.filename) {
  const [folder = "tests/fixtures/photographs/pictures", screens = "tests/fixtures/screens/pictures"] =
    process.argv.slice(2);
  mkdirSync(folder, { recursive: true });
  const whole = truthsIn(screens).filter((truth) => truth.degraded.length === 0);
  for (const [i, truth] of whole.entries()) {
    const { jpeg, truth: seen } = await photograph(
      readFileSync(join(screens, truth.file)),
      truth,
      randomFrom(104729 * (i + 1)),
    );
    writeFileSync(join(folder, seen.file), jpeg);
    writeFileSync(join(folder, seen.file.replace(/\.\w+$/, ".json")), `${JSON.stringify(seen)}\n`);
  }
}
