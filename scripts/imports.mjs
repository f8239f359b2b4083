import { existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";

/** @typedef {{ target: string, typeOnly: boolean }} Import */

/** What a source imports and re-exports, `import(…)` too. @returns {Import[]} */
export function importsOf(code) {
  const found = [];
  for (const [, typeWord, names = "", target] of code.matchAll(
    /\b(?:import|export)\s+(type\s+)?(?:([^"';]*?)\s*\bfrom\s*)?["']([^"']+)["']/g,
  )) {
    const inBraces = /^\{([^}]*)\}$/.exec(names.trim())?.[1];
    const parts = inBraces?.split(",").filter((part) => part.trim() !== "");
    const typeOnly = typeWord !== undefined || (parts?.every((part) => /^\s*type\s/.test(part)) ?? false);
    found.push({ target, typeOnly });
  }
  for (const [, target] of code.matchAll(/\bimport\(\s*["']([^"']+)["']/g))
    found.push({ target, typeOnly: false });
  return found;
}

/** The path from `root` that an import of the file `from` means, undefined for a package. */
export function resolveImport(root, from, target) {
  if (target.startsWith("~/")) return withEnding(root, path.join("app", target.slice(2)));
  if (target.startsWith(".")) return withEnding(root, path.join(path.dirname(from), target));
  return undefined;
}

export function codeOf(file) {
  return withoutComments(readFileSync(file, "utf8"));
}

/** The TypeScript and JavaScript below a folder, declarations left out; none where there is no folder. */
export function filesIn(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const full = path.join(folder, entry.name);
    if (entry.isDirectory()) return filesIn(full);
    return /\.(tsx?|mjs)$/.test(entry.name) && !/\.d\.m?ts$/.test(entry.name) ? [full] : [];
  });
}

function withEnding(root, name) {
  return (
    ENDINGS.map((ending) => name + ending).find(
      (one) => /\.\w+$/.test(one) && existsSync(path.join(root, one)),
    ) ?? name
  );
}

function withoutComments(source) {
  return source.replace(/\/\*[\s\S]*?\*\//g, "").replace(/(^|\s)\/\/.*$/gm, "$1");
}

const ENDINGS = ["", ".ts", ".tsx"];
