import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { appliedMigrations } from "../stack/migrate.ts";
import type { Environment } from "../stack/settings.ts";
import { storageClient } from "../stack/storage.ts";
import { PlainFailure } from "../steps.mjs";
import { FORMAT, MANIFEST_FILE, type Manifest, SCHEMA_TABLES, sha256Of, VERSION } from "./manifest.ts";
import { fetchObject, keysOf } from "./objects.ts";
import { connect, tablesOf, writeTable } from "./tables.ts";

/** All tables, as they were at one moment, and all objects, as one tar. The file appears when it is complete. */
export async function backup(environment: Environment, file: string): Promise<string> {
  if (existsSync(file)) throw new PlainFailure(`${file} exists already. Nothing was written.`);
  const folder = `${file}.part`;
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(path.join(folder, "tables"), { recursive: true, mode: 0o700 });
  mkdirSync(path.join(folder, "objects"));
  try {
    const manifest: Manifest = {
      format: FORMAT,
      version: VERSION,
      madeAt: new Date().toISOString(),
      ...(await copyTables(environment, folder)),
      // After the tables: an object is stored before its row, so every row's object is there.
      objects: await copyObjects(environment, folder),
    };
    writeFileSync(path.join(folder, MANIFEST_FILE), JSON.stringify(manifest, null, 1));
    pack(folder, file);
    const rows = manifest.tables.reduce((sum, table) => sum + table.rows, 0);
    return `${file}: ${rows} rows of ${manifest.tables.length} tables and ${manifest.objects.length} files.`;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function copyTables(
  environment: Environment,
  folder: string,
): Promise<Pick<Manifest, "migrations" | "tables">> {
  const connection = await connect(environment.DATABASE_URL ?? "");
  try {
    await connection.query("set transaction isolation level repeatable read");
    await connection.query("start transaction with consistent snapshot, read only");
    const tables: Manifest["tables"] = [];
    for (const table of await tablesOf(connection)) {
      if (SCHEMA_TABLES.includes(table.name)) continue;
      const name = path.join("tables", `${table.name}.jsonl`);
      const full = path.join(folder, name);
      const rows = await writeTable(connection, table, full);
      const columns = table.columns.map((column) => column.name);
      tables.push({ name: table.name, columns, rows, file: name, sha256: await sha256Of(full) });
    }
    return { migrations: await appliedMigrations(connection), tables };
  } finally {
    await connection.end();
  }
}

async function copyObjects(environment: Environment, folder: string): Promise<Manifest["objects"]> {
  const client = storageClient(environment);
  const bucket = environment.S3_BUCKET ?? "";
  const objects: Manifest["objects"] = [];
  for await (const key of keysOf(client, bucket)) {
    const name = path.join("objects", String(objects.length + 1).padStart(8, "0"));
    const full = path.join(folder, name);
    const contentType = await fetchObject(client, bucket, key, full);
    if (contentType === undefined) continue;
    objects.push({ key, contentType, bytes: statSync(full).size, file: name, sha256: await sha256Of(full) });
  }
  return objects;
}

function pack(folder: string, file: string): void {
  const compress = /\.(gz|tgz)$/.test(file) ? ["-z"] : [];
  const partial = `${file}.new`;
  const result = spawnSync("tar", [...compress, "-cf", partial, "-C", folder, "."], { encoding: "utf8" });
  if (result.status !== 0) {
    rmSync(partial, { force: true });
    throw new PlainFailure(`${result.stderr}\nThe backup could not be written to ${file}. Nothing is there.`);
  }
  renameSync(partial, file);
}
