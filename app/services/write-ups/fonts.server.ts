import { readFile } from "node:fs/promises";
import { createRequire } from "node:module";

let made: Promise<string> | null = null;

/** `@font-face` rules with the page's own fonts inside, for a file that asks nobody for anything; read once. */
export function fontFaces(): Promise<string> {
  made ??= Promise.all(FACES.map(face)).then((faces) => faces.join("\n"));
  return made;
}

async function face({ family, file, style = "normal", weight = "200 800" }: Face): Promise<string> {
  const bytes = await readFile(createRequire(import.meta.url).resolve(`@fontsource-variable/${file}`));
  const source = `url(data:font/woff2;base64,${bytes.toString("base64")}) format("woff2")`;
  return `@font-face{font-family:"${family}";font-style:${style};font-weight:${weight};font-display:swap;src:${source};unicode-range:${LATIN}}`;
}

interface Face {
  family: string;
  file: string;
  style?: "normal" | "italic";
  weight?: string;
}

const TEXT = "atkinson-hyperlegible-next";
const FACES: Face[] = [
  { family: "Atkinson Hyperlegible Next", file: `${TEXT}/files/${TEXT}-latin-wght-normal.woff2` },
  {
    family: "Atkinson Hyperlegible Next",
    file: `${TEXT}/files/${TEXT}-latin-wght-italic.woff2`,
    style: "italic",
  },
  {
    family: "Bricolage Grotesque",
    file: "bricolage-grotesque/files/bricolage-grotesque-latin-wght-normal.woff2",
  },
  {
    family: "Sometype Mono",
    file: "sometype-mono/files/sometype-mono-latin-wght-normal.woff2",
    weight: "400 700",
  },
];

/** What the latin files hold, as their package's style sheet says. */
const LATIN =
  "U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+0304,U+0308,U+0329,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD";
