import sharp from "sharp";
import { findPreview } from "~/db/dip-preview.server";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { log } from "./log.server.ts";
import { escapeHtml } from "./mail.server.ts";
import { decodePoints } from "./points.server.ts";

/** A dip in its sweep as a picture for a mail, which can't draw; null where there is nothing to draw. */
export async function drawDip(dipId: number): Promise<{ html: string; text: string } | null> {
  const found = await findPreview(dipId);
  if (!found?.preview) return null;
  const { numbers } = found;
  const words = `${formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz)}, SWR ${formatSwr(numbers.minimumSwr, numbers.minimumSwrLow, numbers.minimumSwrHigh)}, in the sweep ${found.sweepTitle}`;
  try {
    const svg = drawing(decodePoints([found.preview]), numbers.frequencyHz);
    const png = await sharp(Buffer.from(svg)).png({ compressionLevel: 9, palette: true }).toBuffer();
    const src = `data:image/png;base64,${png.toString("base64")}`;
    const size = `width="${WIDTH}" height="${HEIGHT}"`;
    return {
      html: `<p><img src="${src}" alt="${escapeHtml(words)}" ${size} style="max-width:100%;height:auto"><br>${escapeHtml(words)}</p>`,
      text: words,
    };
  } catch (error) {
    log.warn({ err: error }, "a dip could not be drawn for a mail; it goes without");
    return null;
  }
}

/** The sweep's return loss from crest to hollow, the dip marked; the whole span, linear. */
function drawing(sweep: ReturnType<typeof decodePoints>, dipHz: number): string {
  const { frequencyHz, magnitude } = sweep;
  const lossDb = Array.from(magnitude, (gamma) => {
    const known = Number.isNaN(gamma) ? 1 : gamma;
    return Math.min(MOST_DB, Math.max(0, -20 * Math.log10(Math.max(1e-9, known))));
  });
  const first = frequencyHz[0];
  const span = frequencyHz[frequencyHz.length - 1] - first || 1;
  const deepest = Math.max(10, ...lossDb);
  const x = (hz: number) => (((hz - first) / span) * WIDTH).toFixed(1);
  const y = (db: number) => (8 + (db / deepest) * (HEIGHT - 20)).toFixed(1);
  const line = lossDb.map((db, i) => `${i === 0 ? "M" : "L"}${x(frequencyHz[i])} ${y(db)}`).join("");
  const at = lossDb[nearest(frequencyHz, dipHz)];
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${2 * WIDTH}" height="${2 * HEIGHT}" viewBox="0 0 ${WIDTH} ${HEIGHT}">
<rect width="${WIDTH}" height="${HEIGHT}" fill="#fffdf7"/>
<path d="${line}L${WIDTH} ${HEIGHT}L0 ${HEIGHT}Z" fill="#e7dfca"/>
<path d="${line}" fill="none" stroke="#1e2a2b" stroke-width="1.5" stroke-linejoin="round"/>
<circle cx="${x(dipHz)}" cy="${y(at)}" r="5" fill="#7b4b86"/>
</svg>`;
}

function nearest(values: ArrayLike<number>, target: number): number {
  let best = 0;
  for (let i = 1; i < values.length; i++) {
    if (Math.abs(values[i] - target) < Math.abs(values[best] - target)) best = i;
  }
  return best;
}

const WIDTH = 480;
const HEIGHT = 120;
/** Deeper than any bridge tells. */
const MOST_DB = 80;
