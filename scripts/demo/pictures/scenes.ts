import { writeFileSync } from "node:fs";
import sharp from "sharp";
import type { PictureName } from "../pictures.ts";

/**
 * Draws the demo's scenes anew, where photographs would be: `npx tsx scripts/demo/pictures/scenes.ts`. Invented places; no words in
 * them, so no fonts are needed.
 */

const WIDTH = 960;
const HEIGHT = 640;
const INK = "#24302c";
const PAPER = "#efe8d6";

const reeds = (fromX: number, toX: number, footY: number, every: number, tall: number) => {
  const stalks: string[] = [];
  for (let x = fromX; x < toX; x += every) {
    const lean = 14 * Math.sin(x * 1.7);
    const up = tall * (0.7 + 0.3 * Math.abs(Math.sin(x * 0.93)));
    stalks.push(`M${x} ${footY}q${lean * 0.2} ${-up * 0.6} ${lean} ${-up}`);
  }
  return `<path d="${stalks.join("")}" stroke="#7c8a4e" stroke-width="2.5" fill="none"/>`;
};

const line = (d: string, width = 4, colour = INK, more = "") =>
  `<path d="${d}" stroke="${colour}" stroke-width="${width}" fill="none" stroke-linecap="round" ${more}/>`;

const SCENES: Partial<Record<PictureName, string>> = {
  "reed-bank": `
    <rect width="960" height="430" fill="#dfe6e2"/>
    <circle cx="790" cy="110" r="46" fill="#f3e3b4"/>
    <path d="M0 430h960v210H0z" fill="#b9b184"/>
    <path d="M0 560q240 -46 480 -8t480 -22v110H0z" fill="#9fb3ac"/>
    ${reeds(0, 330, 470, 9, 150)}${reeds(720, 960, 480, 10, 190)}
    ${line("M470 440V48", 7)}${line("M512 440V270", 6)}
    ${line("M440 440h104", 10, "#5a4632")}
    ${[-320, -230, -140, -60, 60, 150, 240, 330].map((x) => line(`M490 446L${490 + x} ${500 + Math.abs(x) * 0.06}`, 2.5, "#8a5a2c")).join("")}
    ${line("M540 446q60 12 110 6t150 -52l150 -40", 5, "#30302e")}
    ${line("M648 425v52", 6, "#6d6f70")}`,
  stake: `
    <rect width="960" height="640" fill="#cfc79f"/>
    <path d="M0 0h960v170q-260 60 -480 22T0 190z" fill="#a9b08a"/>
    ${reeds(0, 960, 190, 12, 110)}
    ${line("M240 430h150", 16, "#5a4632")}${line("M290 430V90", 12)}${line("M345 430V210", 10)}
    ${[
      [-170, 120],
      [-90, 150],
      [10, 170],
      [120, 160],
    ]
      .map(([x, y]) => line(`M310 438l${x} ${y}`, 4, "#8a5a2c"))
      .join("")}
    ${line("M390 436q120 34 250 6", 10, "#30302e")}${line("M640 442q90 -20 320 -150", 10, "#30302e")}
    ${line("M640 380v170", 12, "#6d6f70")}${line("M622 404h36M622 418h36", 5, "#a8803c")}
    ${line("M396 520h238", 3, INK, 'stroke-dasharray="2 12"')}${line("M396 502v36M634 502v36", 4)}`,
  choke: `
    <rect width="960" height="640" fill="#c9c29c"/>
    ${line("M110 300h170", 18, "#5a4632")}${line("M170 300V60", 14)}${line("M235 300V120", 12)}
    <circle cx="520" cy="330" r="150" fill="none" stroke="#3b3f42" stroke-width="74"/>
    ${Array.from({ length: 12 }, (_, i) => {
      const a = (i / 12) * 2 * Math.PI + 0.26;
      const [c, s] = [Math.cos(a), Math.sin(a)];
      return line(`M${520 + 102 * c} ${330 + 102 * s}L${520 + 198 * c} ${330 + 198 * s}`, 22, "#1f2221");
    }).join("")}
    ${line("M280 306q60 20 60 4", 20, "#1f2221")}${line("M716 330q120 20 244 -60", 20, "#1f2221")}`,
  bridge: `
    <rect width="960" height="640" fill="#d9cfb8"/>
    <rect x="0" y="470" width="960" height="170" fill="#a88a64"/>
    <rect x="250" y="200" width="460" height="260" rx="10" fill="#b7bfc0" stroke="${INK}" stroke-width="4"/>
    <rect x="282" y="232" width="396" height="196" rx="4" fill="#8f9a9a"/>
    ${line("M480 250l90 80l-90 80l-90 -80z", 5, PAPER)}
    ${[
      [435, 290],
      [525, 290],
      [435, 370],
      [525, 370],
    ]
      .map(
        ([x, y]) =>
          `<rect x="${x - 20}" y="${y - 9}" width="40" height="18" rx="9" fill="#d9b98a" stroke="${INK}" stroke-width="3"/>`,
      )
      .join("")}
    <rect x="206" y="300" width="46" height="56" fill="#c8b069" stroke="${INK}" stroke-width="4"/>
    <rect x="708" y="300" width="46" height="56" fill="#c8b069" stroke="${INK}" stroke-width="4"/>
    <rect x="452" y="158" width="56" height="44" fill="#c8b069" stroke="${INK}" stroke-width="4"/>
    ${line("M206 328H60q-50 0 -60 60", 12, "#30302e")}${line("M754 328h140q50 0 66 -70", 12, "#30302e")}
    ${[
      [300, 540],
      [430, 552],
      [560, 540],
    ]
      .map(
        ([x, y], i) =>
          `<rect x="${x}" y="${y}" width="70" height="44" rx="6" fill="#c8b069" stroke="${INK}" stroke-width="4"/>${i === 2 ? `<rect x="${x + 16}" y="${y + 12}" width="38" height="20" fill="#a33"/>` : ""}`,
      )
      .join("")}`,
  attic: `
    <rect width="960" height="640" fill="#d8cbb2"/>
    <path d="M0 640L480 40L960 640z" fill="#c0ab86"/>
    ${[0, 1, 2, 3, 4].map((i) => line(`M${60 + i * 84} ${565 - i * 105}h${840 - i * 168}`, 3, "#8f6f47")).join("")}
    ${line("M0 640L480 40L960 640", 26, "#7b5a38")}${line("M170 640L480 250L790 640", 10, "#7b5a38")}
    ${line("M120 560L478 112L840 560", 4, "#b3261e")}
    <rect x="462" y="100" width="36" height="24" rx="4" fill="#efe8d6" stroke="${INK}" stroke-width="3"/>
    ${line("M480 124V640", 7, "#30302e")}
    ${line("M330 640v-70h300v70", 8, "#7b5a38")}`,
};

for (const [name, scene] of Object.entries(SCENES)) {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}" viewBox="0 0 ${WIDTH} ${HEIGHT}"><rect width="${WIDTH}" height="${HEIGHT}" fill="${PAPER}"/>${scene}</svg>`;
  const picture = await sharp(Buffer.from(svg)).png({ palette: true, colours: 48 }).toBuffer();
  writeFileSync(new URL(`./${name}.png`, import.meta.url), picture);
}
