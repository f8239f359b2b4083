import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, rmSync } from "node:fs";
import path from "node:path";
import type { Connection, RowDataPacket } from "mysql2/promise";
import { knownMigrations, migrate } from "../stack/migrate.ts";
import type { Environment } from "../stack/settings.ts";
import { ensureBucket, storageClient } from "../stack/storage.ts";
import { PlainFailure } from "../steps.mjs";
import { type Manifest, readManifest, SCHEMA_TABLES } from "./manifest.ts";
import { keysOf, removeObject, storeObject } from "./objects.ts";
import { connect, loadTable, tablesOf } from "./tables.ts";

/** Puts a backup back. Everything is checked before anything is changed; what is there is kept unless forced. */
export async function restore(environment: Environment, file: string, force: boolean): Promise<string> {
  if (!existsSync(file)) throw new PlainFailure(`There is no ${file}. Nothing was changed.`);
  const folder = mkdtempSync(`${file}.restore-`);
  const connection = await connect(environment.DATABASE_URL ?? "");
  try {
    unpack(file, folder);
    const manifest = await readManifest(folder);
    const unknown = manifest.migrations.filter((hash) => !knownMigrations().includes(hash));
    if (unknown.length > 0) {
      throw new PlainFailure(
        "This backup was made by a later version of Swale. Nothing was changed. Restore it with that version.",
      );
    }
    await ensureBucket(environment);
    if (!force) await refuseWhereFull(connection, environment);
    await restoreObjects(environment, manifest, folder);
    await dropTables(connection);
    await migrate(environment.DATABASE_URL ?? "", manifest.migrations.at(-1));
    await restoreTables(connection, manifest, folder);
    await migrate(environment.DATABASE_URL ?? "");
    await removeOtherObjects(environment, manifest);
    const rows = manifest.tables.reduce((sum, table) => sum + table.rows, 0);
    return `Restored the backup of ${manifest.madeAt}: ${rows} rows and ${manifest.objects.length} files.`;
  } finally {
    await connection.end();
    rmSync(folder, { recursive: true, force: true });
  }
}

function unpack(file: string, folder: string): void {
  const result = spawnSync("tar", ["-xf", file, "-C", folder, "--no-same-owner"], { encoding: "utf8" });
  if (result.status !== 0) {
    throw new PlainFailure(`${result.stderr}\n${file} is not a whole backup. Nothing was changed.`);
  }
}

async function refuseWhereFull(connection: Connection, environment: Environment): Promise<void> {
  const full: string[] = [];
  for (const { name } of await tablesOf(connection)) {
    if (SCHEMA_TABLES.includes(name)) continue;
    const [rows] = await connection.query<RowDataPacket[]>(`select 1 from \`${name}\` limit 1`);
    if (rows.length > 0) full.push(name);
  }
  const firstKey = await keysOf(storageClient(environment), environment.S3_BUCKET ?? "").next();
  if (full.length === 0 && firstKey.done) return;
  const what = [full.length > 0 ? `rows in ${full.join(", ")}` : "", firstKey.done ? "" : "stored files"];
  throw new PlainFailure(
    `There is something here already: ${what.filter(Boolean).join(" and ")}. Nothing was changed. With --force all of it is removed first.`,
  );
}

async function dropTables(connection: Connection): Promise<void> {
  await connection.query("set foreign_key_checks = 0");
  for (const { name } of await tablesOf(connection)) await connection.query(`drop table \`${name}\``);
  await connection.query("set foreign_key_checks = 1");
}

/** In one transaction: either every row is there or none. */
async function restoreTables(connection: Connection, manifest: Manifest, folder: string): Promise<void> {
  await connection.query("set foreign_key_checks = 0, unique_checks = 0, time_zone = '+00:00'");
  await connection.beginTransaction();
  for (const { name, columns, file } of manifest.tables) {
    // A migration may have put rows there; the backup has them too.
    await connection.query(`delete from \`${name}\``);
    await loadTable(connection, name, columns, path.join(folder, file));
  }
  await connection.commit();
}

async function restoreObjects(environment: Environment, manifest: Manifest, folder: string): Promise<void> {
  const client = storageClient(environment);
  for (const object of manifest.objects) {
    await storeObject(client, environment.S3_BUCKET ?? "", object, path.join(folder, object.file));
  }
}

async function removeOtherObjects(environment: Environment, manifest: Manifest): Promise<void> {
  const client = storageClient(environment);
  const bucket = environment.S3_BUCKET ?? "";
  const wanted = new Set(manifest.objects.map((object) => object.key));
  const others: string[] = [];
  for await (const key of keysOf(client, bucket)) if (!wanted.has(key)) others.push(key);
  for (const key of others) await removeObject(client, bucket, key);
}
