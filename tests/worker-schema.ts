import mysql from "mysql2/promise";
import { migrate } from "../scripts/stack/migrate.ts";
import { ensureBucket } from "../scripts/stack/storage.ts";

/** Gives each worker a schema, made by the real migrations, and a bucket of its own; each test file finds them empty. */
const name = `swale_test_${process.env.VITEST_POOL_ID}`;
const url = new URL(process.env.DATABASE_URL ?? "");
url.pathname = "/swale";
const admin = await mysql.createConnection({ uri: url.href });
await admin.query(`drop database if exists ${name}`);
await admin.query(`create database ${name} character set utf8mb4 collate utf8mb4_unicode_520_ci`);
await admin.end();
url.pathname = `/${name}`;
process.env.DATABASE_URL = url.href;
process.env.S3_BUCKET = name.replaceAll("_", "-");
await migrate(url.href);
await ensureBucket(process.env);
