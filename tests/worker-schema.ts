import mysql from "mysql2/promise";
import { SCHEMA_TABLES } from "../scripts/admin/manifest.ts";
import { keysOf, removeObject } from "../scripts/admin/objects.ts";
import { tablesOf } from "../scripts/admin/tables.ts";
import { migrate } from "../scripts/stack/migrate.ts";
import { ensureBucket, storageClient } from "../scripts/stack/storage.ts";

/** Gives each worker a schema, made by the real migrations, and a bucket of its own; each test file finds them empty. */
const name = `swale_test_${process.env.VITEST_POOL_ID}`;
const url = new URL(process.env.DATABASE_URL ?? "");
url.pathname = "/swale";
const connection = await mysql.createConnection({ uri: url.href });
await connection.query(
  `create database if not exists ${name} character set utf8mb4 collate utf8mb4_unicode_520_ci`,
);
await connection.query(`use ${name}`);
url.pathname = `/${name}`;
process.env.DATABASE_URL = url.href;
await migrate(url.href);
await connection.query("set foreign_key_checks = 0");
for (const table of await tablesOf(connection)) {
  if (!SCHEMA_TABLES.includes(table.name)) await connection.query(`delete from \`${table.name}\``);
}
await connection.end();

const bucket = name.replaceAll("_", "-");
process.env.S3_BUCKET = bucket;
await ensureBucket(process.env);
const client = storageClient(process.env);
for await (const key of keysOf(client, bucket)) await removeObject(client, bucket, key);
client.destroy();
