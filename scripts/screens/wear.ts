import sharp from "sharp";
import type { Truth } from "./picture.ts";
import type { Random } from "./random.ts";

/** What happens to pictures on their way: scaled, reduced to a palette, worn by compression. Changes the truth's places. */
export async function wear(
  png: Buffer,
  truth: Truth,
  random: Random,
): Promise<{ bytes: Buffer; truth: Truth }> {
  let picture = sharp(png).flatten({ background: "#ffffff" });
  const degraded: string[] = [];
  let { plot, size } = truth;
  if (random.chance(0.25)) {
    const factor = random.pick([0.8, 1.25, 1.5]);
    size = [Math.round(size[0] * factor), Math.round(size[1] * factor)];
    const move = (v: number) => (v + 0.5) * factor - 0.5;
    plot = {
      ...plot,
      left: move(plot.left),
      right: move(plot.right),
      top: move(plot.top),
      bottom: move(plot.bottom),
    };
    picture = sharp(await picture.resize(size[0], size[1]).png().toBuffer());
    degraded.push(`scaled ${factor}`);
  }
  const stem = truth.file.replace(/\.png$/, "");
  const done = (bytes: Buffer, ending: string) => ({
    bytes,
    truth: { ...truth, file: stem + ending, size, plot, degraded },
  });
  const manner = random.pick(["png", "png", "jpeg", "webp", "palette"]);
  if (manner === "jpeg") {
    const quality = random.pick([70, 80, 92]);
    degraded.push(`jpeg q${quality}`);
    return done(await picture.jpeg({ quality }).toBuffer(), ".jpg");
  }
  if (manner === "webp") {
    degraded.push("webp q80");
    return done(await picture.webp({ quality: 80 }).toBuffer(), ".webp");
  }
  if (manner === "palette") {
    degraded.push("palette 32");
    return done(await picture.png({ palette: true, colours: 32 }).toBuffer(), ".png");
  }
  return done(await picture.png({ compressionLevel: 9 }).toBuffer(), ".png");
}
