import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { ROOT } from "../install.mjs";
import { runToEnd } from "./child.ts";

const SOURCES = [
  "app",
  "public",
  "server.ts",
  "vite.config.ts",
  "react-router.config.ts",
  "tsconfig.json",
  "package-lock.json",
];
const STAMP = path.join(ROOT, "build", "sources.sha256");

/** Builds when the sources are not those of the last finished build. */
export async function buildWhereNeeded(folder: string): Promise<string> {
  const wanted = hashOfSources();
  if (existsSync(STAMP) && readFileSync(STAMP, "utf8") === wanted) return "nothing changed";
  rmSync(STAMP, { force: true });
  await runToEnd({
    name: "build",
    folder,
    program: process.execPath,
    arguments: [path.join(ROOT, "node_modules", "@react-router", "dev", "bin.js"), "build"],
    environment: { ...process.env, NODE_ENV: "production" },
  });
  writeFileSync(STAMP, wanted);
  return "";
}

function hashOfSources(): string {
  const hash = createHash("sha256").update(process.version);
  for (const source of SOURCES) addTo(hash, source);
  return hash.digest("hex");
}

function addTo(hash: ReturnType<typeof createHash>, relative: string): void {
  const full = path.join(ROOT, relative);
  if (!existsSync(full)) return;
  if (statSync(full).isDirectory()) {
    for (const name of readdirSync(full).sort()) addTo(hash, path.join(relative, name));
  } else {
    hash.update(relative).update("\0").update(readFileSync(full));
  }
}
