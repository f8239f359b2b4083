import type { Sweep } from "../../measurement/sweep.ts";
import { escapeHtml } from "../html-text.ts";

/** A sweep as a drawing that needs nothing else: return loss downwards in dB over frequency, its dips marked. */
export function sweepFigure(sweep: Sweep, dipsHz: readonly number[], title: string): string {
  const { frequencyHz, magnitude } = sweep;
  const n = frequencyHz.length;
  const first = frequencyHz[0] ?? 0;
  const span = (frequencyHz[n - 1] ?? 1) - first || 1;
  const lossDb = Array.from(magnitude, (gamma) =>
    Number.isNaN(gamma)
      ? Number.NaN
      : Math.min(MOST_DB, Math.max(0, -20 * Math.log10(Math.max(1e-9, gamma)))),
  );
  const deepest = Math.ceil(Math.max(10, ...lossDb.filter((db) => !Number.isNaN(db))) / 10) * 10;
  const x = (hz: number) => (LEFT + ((hz - first) / span) * (WIDTH - LEFT - 8)).toFixed(1);
  const y = (db: number) => (10 + (db / deepest) * (HEIGHT - 56)).toFixed(1);
  const step = Math.max(1, Math.floor(n / MOST_POINTS));
  let path = "";
  let open = false;
  for (let i = 0; i < n; i += 1) {
    const kept =
      i % step === 0 || i === n - 1 || dipsHz.some((hz) => Math.abs(hz - frequencyHz[i]) * n < span);
    if (!kept) continue;
    if (Number.isNaN(lossDb[i])) open = false;
    else {
      path += `${open ? "L" : "M"}${x(frequencyHz[i])} ${y(lossDb[i])}`;
      open = true;
    }
  }
  const rows = Array.from({ length: deepest / 10 + 1 }, (_, i) => i * 10).map(
    (db) =>
      `<path d="M${LEFT} ${y(db)}H${WIDTH - 8}" stroke="#d6cdb6"/><text x="${LEFT - 6}" y="${Number(y(db)) + 4}" text-anchor="end">${db}</text>`,
  );
  const columns = [0, 0.25, 0.5, 0.75, 1].map((share) => {
    const hz = first + share * span;
    const anchor = share === 1 ? "end" : share === 0 ? "start" : "middle";
    return `<text x="${x(hz)}" y="${HEIGHT - 28}" text-anchor="${anchor}">${Number((hz / 1e6).toPrecision(5))}</text>`;
  });
  const marks = dipsHz.map(
    (hz) => `<path d="M${x(hz)} 10V${HEIGHT - 46}" stroke="#7b4b86" stroke-dasharray="3 3"/>`,
  );
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" role="img" font-family="sans-serif" font-size="11" fill="#3c4647">
<title>${escapeHtml(title)}</title>
<rect width="${WIDTH}" height="${HEIGHT}" fill="#fffdf7"/>
${rows.join("")}${columns.join("")}${marks.join("")}
<path d="${path}" fill="none" stroke="#1e2a2b" stroke-width="1.5" stroke-linejoin="round"/>
<text x="${LEFT}" y="${HEIGHT - 8}">MHz; return loss in dB, downwards</text>
</svg>
`;
}

const WIDTH = 640;
const HEIGHT = 256;
const LEFT = 32;
const MOST_POINTS = 500;
/** Deeper than any bridge tells. */
const MOST_DB = 80;
