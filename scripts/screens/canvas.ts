import { chromium } from "playwright-core";
import { BROWSER, findProgram } from "../install.mjs";
import type { Scene } from "./scene.ts";

const ARGUMENTS = [
  "--no-sandbox",
  "--disable-gpu",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
  "--disable-quic",
];

/** Paints scenes on a canvas in Chromium (`CHROMIUM`, else Debian's). */
export async function canvasPainter(): Promise<{
  paint: (scene: Scene) => Promise<Buffer>;
  close: () => Promise<void>;
}> {
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? findProgram(BROWSER),
    args: ARGUMENTS,
  });
  const page = await browser.newPage();
  return {
    paint: async (scene) => {
      const address = await page.evaluate(paintInPage, scene);
      return Buffer.from(address.slice(address.indexOf(",") + 1), "base64");
    },
    close: () => browser.close(),
  };
}

/** Runs in the page. */
function paintInPage(scene: Scene): string {
  const canvas = document.createElement("canvas");
  canvas.width = scene.width;
  canvas.height = scene.height;
  const pen = canvas.getContext("2d");
  if (!pen) throw new Error("The browser has no canvas.");
  for (const mark of scene.marks) {
    pen.save();
    pen.beginPath();
    if (mark.kind === "area") {
      pen.fillStyle = mark.fill;
      pen.fillRect(mark.x, mark.y, mark.width, mark.height);
    } else if (mark.kind === "line" || mark.kind === "path") {
      const points =
        mark.kind === "path"
          ? mark.points
          : [
              [mark.x1, mark.y1],
              [mark.x2, mark.y2],
            ];
      if (mark.kind === "path" && mark.clip) {
        pen.rect(...mark.clip);
        pen.clip();
        pen.beginPath();
      }
      for (const [x, y] of points) pen.lineTo(x, y);
      pen.strokeStyle = mark.color;
      pen.lineWidth = mark.width;
      pen.lineJoin = "round";
      pen.setLineDash(mark.dash ?? []);
      pen.stroke();
    } else if (mark.kind === "shape") {
      for (const [x, y] of mark.points) pen.lineTo(x, y);
      pen.fillStyle = mark.fill;
      pen.fill();
    } else {
      pen.translate(mark.x, mark.y);
      if (mark.turned) pen.rotate(-Math.PI / 2);
      pen.font = `${mark.size}px "${mark.font}"`;
      pen.textAlign = mark.align === "middle" ? "center" : mark.align;
      pen.fillStyle = mark.color;
      pen.fillText(mark.text, 0, 0);
    }
    pen.restore();
  }
  return canvas.toDataURL("image/png");
}
