import { BUNDLE_FORMAT } from "./readme.ts";

/** The tag files of a bag. Source: RFC 8493, The BagIt File Packaging Format (V1.0), section 2 (from memory, not seen). */

export interface Sums {
  path: string;
  bytes: number;
  sha256: string;
  sha512: string;
}

export function bagDeclaration(): string {
  return "BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n";
}

export function bagInfo(about: Record<string, string>, bytes: number, files: number, at: Date): string {
  const lines: Record<string, string> = {
    ...about,
    "Swale-Bundle-Format": String(BUNDLE_FORMAT),
    "Bagging-Date": at.toISOString().slice(0, 10),
    "Payload-Oxum": `${bytes}.${files}`,
  };
  return Object.entries(lines)
    .map(([label, value]) => `${label}: ${value.replace(/\s+/g, " ").trim()}\n`)
    .join("");
}

/** `label: value` lines; a line that begins with space goes on with the one before. */
export function readBagInfo(text: string): Map<string, string> {
  const found = new Map<string, string>();
  for (const line of text.replace(/\r?\n[ \t]+/g, " ").split(/\r?\n/)) {
    const colon = line.indexOf(":");
    if (colon > 0) found.set(line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim());
  }
  return found;
}

/** As sha256sum writes it. Paths of ours hold neither line ends nor a per cent sign, which the RFC would have encoded. */
export function manifestOf(sums: Sums[], method: "sha256" | "sha512"): string {
  return sums.map((sum) => `${sum[method]}  ${sum.path}\n`).join("");
}

/** Path → sum; null for a line that is none, or a path that is named twice. */
export function readManifest(text: string): Map<string, string> | null {
  const found = new Map<string, string>();
  for (const [line] of text.matchAll(/[^\r\n]+/g)) {
    const parts = /^([0-9a-fA-F]{64}|[0-9a-fA-F]{128})[ \t]+\*?([^ \t*].*)$/s.exec(line);
    if (!parts) return null;
    const path = parts[2].replace(/%(0A|0D|25)/gi, (code) => decodeURIComponent(code));
    if (found.has(path)) return null;
    found.set(path, parts[1].toLowerCase());
  }
  return found;
}
