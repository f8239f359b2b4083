import { createHash } from "node:crypto";
import { createReadStream, existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { pipeline } from "node:stream/promises";
import { PlainFailure } from "../steps.mjs";

/** What a backup says of itself, in `manifest.json`. Beside it: `tables/NAME.jsonl` and `objects/NUMBER`. */
export interface Manifest {
  format: typeof FORMAT;
  version: typeof VERSION;
  madeAt: string;
  /** The migrations that the database had, in order. */
  migrations: string[];
  tables: { name: string; columns: string[]; rows: number; file: string; sha256: string }[];
  objects: { key: string; contentType: string; bytes: number; file: string; sha256: string }[];
}

export const FORMAT = "swale-backup";
export const VERSION = 1;
export const MANIFEST_FILE = "manifest.json";

/** Tables that say how the schema came about; they are made again rather than copied. */
export const SCHEMA_TABLES = ["__drizzle_migrations", "__swale_migration_steps"];

/** Reads the manifest in `folder` and compares every file with its checksum. */
export async function readManifest(folder: string): Promise<Manifest> {
  const file = path.join(folder, MANIFEST_FILE);
  if (!existsSync(file))
    throw new PlainFailure("This is not a backup of Swale: it has no manifest. Nothing was changed.");
  const manifest: Manifest = JSON.parse(readFileSync(file, "utf8"));
  if (manifest.format !== FORMAT || manifest.version !== VERSION) {
    throw new PlainFailure(
      `This backup has format ${manifest.format} ${manifest.version}, and ${FORMAT} ${VERSION} is known here. Nothing was changed.`,
    );
  }
  for (const part of [...manifest.tables, ...manifest.objects]) {
    const full = path.join(folder, part.file);
    if (!full.startsWith(folder) || !existsSync(full) || (await sha256Of(full)) !== part.sha256) {
      throw new PlainFailure(
        `The backup is damaged: ${part.file} is not what it was when it was made. Nothing was changed.`,
      );
    }
  }
  return manifest;
}

export async function sha256Of(file: string): Promise<string> {
  const hash = createHash("sha256");
  await pipeline(createReadStream(file), hash);
  return hash.digest("hex");
}
