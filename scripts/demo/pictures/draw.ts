import { writeFileSync } from "node:fs";
import sharp from "sharp";
import type { PictureName } from "../pictures.ts";
import { radialsOnScreen } from "../reed-bank.ts";

/**
 * Draws the demo's two pictures anew: `npx tsx scripts/demo/pictures/draw.ts`. Invented data in a skin of our own. It
 * needs a sans-serif font on the machine, so its pictures are committed.
 */

const WIDTH = 960;
const HEIGHT = 600;
const PLOT = { left: 96.5, right: 896.5, top: 70.5, bottom: 520.5 };
const BOTTOM_DB = -40;
const COLUMNS = 10;
const ROWS = 8;

for (const [name, startMHz, stopMHz] of [
  ["screen-5-25", 5, 25],
  ["screen-46-58", 46, 58],
] as const satisfies [PictureName, number, number][]) {
  const picture = await sharp(Buffer.from(draw(name, startMHz, stopMHz)))
    .png({ palette: false })
    .toBuffer();
  writeFileSync(new URL(`./${name}.png`, import.meta.url), picture);
}

function draw(name: PictureName, startMHz: number, stopMHz: number): string {
  const x = (mhz: number) => PLOT.left + ((mhz - startMHz) / (stopMHz - startMHz)) * (PLOT.right - PLOT.left);
  const y = (db: number) => PLOT.top + (db / BOTTOM_DB) * (PLOT.bottom - PLOT.top);
  const magnitude = radialsOnScreen(name);
  const points: string[] = [];
  for (let i = 0; i <= 800; i++) {
    const mhz = startMHz + ((stopMHz - startMHz) * i) / 800;
    const db = Math.max(BOTTOM_DB, 20 * Math.log10(magnitude(mhz * 1e6)));
    points.push(`${x(mhz).toFixed(2)},${y(db).toFixed(2)}`);
  }
  const grid: string[] = [];
  const words: string[] = [];
  for (let i = 0; i <= COLUMNS; i++) {
    const mhz = startMHz + ((stopMHz - startMHz) * i) / COLUMNS;
    grid.push(`M${x(mhz)} ${PLOT.top}V${PLOT.bottom}`);
    if (i % 2 === 0) words.push(label(x(mhz), PLOT.bottom + 26, "middle", String(Number(mhz.toFixed(2)))));
  }
  for (let i = 0; i <= ROWS; i++) {
    const db = (BOTTOM_DB * i) / ROWS;
    grid.push(`M${PLOT.left} ${y(db)}H${PLOT.right}`);
    words.push(label(PLOT.left - 10, y(db) + 6, "end", String(db)));
  }
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}" font-family="DejaVu Sans, sans-serif" font-size="17" fill="#24302c">
    <rect width="${WIDTH}" height="${HEIGHT}" fill="#dfe5d8"/>
    <rect x="${PLOT.left}" y="${PLOT.top}" width="${PLOT.right - PLOT.left}" height="${PLOT.bottom - PLOT.top}" fill="#f7f8f2"/>
    <path d="${grid.join("")}" stroke="#b9c2b4" fill="none"/>
    <rect x="${PLOT.left}" y="${PLOT.top}" width="${PLOT.right - PLOT.left}" height="${PLOT.bottom - PLOT.top}" fill="none" stroke="#4a5650"/>
    <polyline points="${points.join(" ")}" fill="none" stroke="#1d4fa8" stroke-width="2"/>
    ${words.join("\n")}
    ${label(PLOT.left, 40, "start", "reed bank, 24 radials, 28 March")}
    ${label(PLOT.right, 40, "end", "S11 dB")}
    ${label((PLOT.left + PLOT.right) / 2, HEIGHT - 20, "middle", "Frequency (MHz)")}
  </svg>`;
}

function label(x: number, y: number, anchor: string, words: string): string {
  return `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" text-anchor="${anchor}">${words}</text>`;
}
