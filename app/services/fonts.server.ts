import { mkdtempSync, rmSync } from "node:fs";
import { readFile, rename, writeFile } from "node:fs/promises";
import { createRequire } from "node:module";
import { tmpdir } from "node:os";
import path from "node:path";
import { getEnvironmentData, setEnvironmentData, threadId } from "node:worker_threads";
import { decompress } from "woff2-encoder";

/**
 * Fonts for drawings and papers that are made on the server: the ones that pages get, unpacked to TrueType, and behind
 * them one that has Greek, Cyrillic and the signs of mathematics, which ours lack.
 */
interface FontFile {
  name: FontName;
  /** As the file calls itself, which is what drawings are matched by. */
  family: string;
  bytes: Buffer;
  /** On disk: some libraries take nothing else. */
  path: string;
}

/** Where this process and its threads unpack them: threads may end at any moment, so that it goes with what started them. */
export function fontFolder(): string {
  const known = getEnvironmentData(FOLDER);
  if (typeof known === "string") return known;
  const folder = mkdtempSync(path.join(tmpdir(), "swale-fonts-"));
  process.once("exit", () => rmSync(folder, { recursive: true, force: true }));
  setEnvironmentData(FOLDER, folder);
  return folder;
}

/** Unpacked once a thread. */
export function loadFonts(): Promise<readonly FontFile[]> {
  loading ??= unpackAll().catch((error) => {
    loading = undefined;
    throw error;
  });
  return loading;
}

let loading: Promise<readonly FontFile[]> | undefined;
const require = createRequire(import.meta.url);
const FOLDER = "swale-fonts";

async function unpackAll(): Promise<readonly FontFile[]> {
  const folder = fontFolder();
  return Promise.all(
    FILES.map(async ({ name, family, file }) => {
      const stored = await readFile(require.resolve(file));
      const bytes = file.endsWith(".woff2") ? Buffer.from(await decompress(stored)) : stored;
      const own = path.join(folder, `${name}.ttf`);
      // Another thread may read the same file at this moment.
      await writeFile(`${own}.${threadId}`, bytes);
      await rename(`${own}.${threadId}`, own);
      return { name, family, bytes, path: own };
    }),
  );
}

const ours = (font: string, face: string) => `@fontsource/${font}/files/${font}-${face}.woff2`;
const SANS = { family: "Atkinson Hyperlegible Next", font: "atkinson-hyperlegible-next" };
const MONO = { family: "Sometype Mono", font: "sometype-mono" };
/** Its static files keep the name of the variable one's largest face. */
const DISPLAY = { family: "Bricolage Grotesque 96pt ExtraBold", font: "bricolage-grotesque" };

const FILES = [
  { name: "sans", family: SANS.family, file: ours(SANS.font, "latin-400-normal") },
  { name: "sans-ext", family: SANS.family, file: ours(SANS.font, "latin-ext-400-normal") },
  { name: "sans-italic", family: SANS.family, file: ours(SANS.font, "latin-400-italic") },
  { name: "sans-bold", family: SANS.family, file: ours(SANS.font, "latin-700-normal") },
  { name: "sans-bold-ext", family: SANS.family, file: ours(SANS.font, "latin-ext-700-normal") },
  { name: "sans-bold-italic", family: SANS.family, file: ours(SANS.font, "latin-700-italic") },
  { name: "display", family: DISPLAY.family, file: ours(DISPLAY.font, "latin-600-normal") },
  { name: "display-ext", family: DISPLAY.family, file: ours(DISPLAY.font, "latin-ext-600-normal") },
  { name: "mono", family: MONO.family, file: ours(MONO.font, "latin-400-normal") },
  { name: "mono-ext", family: MONO.family, file: ours(MONO.font, "latin-ext-400-normal") },
  { name: "rest", family: "Roboto", file: "pdfmake/fonts/Roboto/Roboto-Regular.ttf" },
  { name: "rest-bold", family: "Roboto", file: "pdfmake/fonts/Roboto/Roboto-Medium.ttf" },
] as const;
export type FontName = (typeof FILES)[number]["name"];
/** What the drawings call the display font, and what its file calls itself. */
export const DISPLAY_NAMES = { drawn: "Bricolage Grotesque", file: DISPLAY.family };
