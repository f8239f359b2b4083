import sharp from "sharp";
import { cornersOf, homography, mapPoint } from "~/readers/screenshot/rectify";

/** Screens of our own invention, drawn at test time: a dark plot with printed axes and one sweep with a dip. */
export interface DrawnScreen {
  dipMHz?: number;
  /** Leave out what is printed around the plot. */
  bare?: boolean;
  /** The vertical axis shows a level: what the top line is, dB. */
  levelTopDb?: number;
  /** A livelier second trace that is not the sweep. */
  decoy?: boolean;
  /** Changes nothing that is read, only the bytes. */
  salt?: string;
  width?: number;
}

export const PLOT = { left: 90, top: 60, right: 890, bottom: 460, width: 960, height: 540 };
export const SPAN = { startMHz: 5, stopMHz: 25, top: 0, bottom: -40 };

export function screenSvg(screen: DrawnScreen = {}): string {
  const { dipMHz = 14.2, bare = false, levelTopDb, decoy = false, salt = "" } = screen;
  const { left, top, right, bottom, width, height } = PLOT;
  const x = (mhz: number) => left + ((mhz - SPAN.startMHz) / (SPAN.stopMHz - SPAN.startMHz)) * (right - left);
  const y = (db: number) => top + ((SPAN.top - db) / (SPAN.top - SPAN.bottom)) * (bottom - top);
  const path = (level: (mhz: number) => number) =>
    Array.from({ length: 801 }, (_, i) => {
      const mhz = SPAN.startMHz + (i * (SPAN.stopMHz - SPAN.startMHz)) / 800;
      return `${i ? "L" : "M"}${x(mhz).toFixed(3)} ${y(level(mhz)).toFixed(3)}`;
    }).join("");
  const sweep = (mhz: number) => -1.5 - 26 / (1 + ((mhz - dipMHz) / 0.9) ** 2);
  const grid = Array.from({ length: 11 }, (_, i) => {
    const column = left + ((right - left) * i) / 10;
    const row = top + ((bottom - top) * i) / 8;
    const across = i <= 8 ? `<path d="M${left} ${row}H${right}"/>` : "";
    return `<path d="M${column} ${top}V${bottom}"/>${across}`;
  }).join("");
  const topDb = levelTopDb ?? 0;
  const words = bare
    ? ""
    : `<g fill="#f0f4f8" font-family="DejaVu Sans" font-size="17">
      ${Array.from({ length: 5 }, (_, i) => `<text x="${left - 12}" y="${y(-10 * i) + 6}" text-anchor="end">${topDb - 10 * i}</text>`).join("")}
      <text x="${left}" y="${bottom + 30}">Start ${SPAN.startMHz}.000 MHz</text>
      <text x="${right}" y="${bottom + 30}" text-anchor="end">Stop ${SPAN.stopMHz}.000 MHz</text>
      <text x="${left}" y="${top - 18}">${levelTopDb === undefined ? "S11 dB" : "Level dBm"}</text></g>`;
  const other = decoy
    ? `<path d="${path((mhz) => -20 - 14 * Math.sin(mhz / 1.1))}" stroke="#ff5566" stroke-width="3.4" fill="none"/>`
    : "";
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">
    <!-- ${salt} --><rect width="${width}" height="${height}" fill="#10161c"/>
    <g stroke="#5a6672" stroke-width="1" transform="translate(0.5 0.5)">${grid}</g>
    <g transform="translate(0.5 0.5)">${other}<path d="${path(sweep)}" stroke="#ffd23c" stroke-width="2" fill="none"/></g>${words}</svg>`;
}

export async function drawnScreen(screen: DrawnScreen = {}): Promise<Buffer> {
  // The salt goes in as a pixel in the corner, so that two pictures of one screen are two files.
  const shade = [...(screen.salt ?? "")].reduce((sum, sign) => (sum * 31 + sign.charCodeAt(0)) % 200, 7);
  const svg = screenSvg(screen).replace(
    "</svg>",
    `<rect width="2" height="2" fill="rgb(${shade},20,${(shade * 7) % 200})"/></svg>`,
  );
  return sharp(Buffer.from(svg)).png().toBuffer();
}

/** Where the plot's corners lie in the photograph: top left, top right, bottom right, bottom left. */
export const PHOTO_CORNERS = [
  { x: 130, y: 110 },
  { x: 850, y: 170 },
  { x: 800, y: 560 },
  { x: 100, y: 500 },
];

/** The screen as a camera sees it from the side, blurred a little and worn by compression. */
export async function photographedScreen(screen: DrawnScreen = {}): Promise<Buffer> {
  const { data, info } = await sharp(await drawnScreen(screen))
    .ensureAlpha()
    .raw()
    .toBuffer({ resolveWithObject: true });
  const back = homography(PHOTO_CORNERS, cornersOf(PLOT));
  if (!back) throw new Error("no such view");
  const [width, height] = [1000, 700];
  const sums = new Float32Array(3 * width * height).fill(0x2b);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      for (let s = 0; s < 9; s++) {
        const at = mapPoint(back, { x: x + (s % 3) / 3 - 1 / 3, y: y + Math.floor(s / 3) / 3 - 1 / 3 });
        const [px, py] = [Math.round(at.x), Math.round(at.y)];
        if (px < 0 || py < 0 || px >= info.width || py >= info.height) continue;
        for (let c = 0; c < 3; c++) {
          const to = 3 * (y * width + x) + c;
          sums[to] += (data[4 * (py * info.width + px) + c] - 0x2b) / 9;
        }
      }
    }
  }
  return sharp(Buffer.from(Uint8Array.from(sums)), { raw: { width, height, channels: 3 } })
    .blur(0.5)
    .jpeg({ quality: 90 })
    .toBuffer();
}
