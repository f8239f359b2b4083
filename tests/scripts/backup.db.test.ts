import { spawnSync } from "node:child_process";
import { appendFileSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { GetObjectCommand, PutObjectCommand } from "@aws-sdk/client-s3";
import mysql, { type Connection, type RowDataPacket } from "mysql2/promise";
import { afterAll, beforeAll, expect, test } from "vitest";
import { backup } from "../../scripts/admin/backup.ts";
import { keysOf } from "../../scripts/admin/objects.ts";
import { restore } from "../../scripts/admin/restore.ts";
import type { Environment } from "../../scripts/stack/settings.ts";
import { ensureBucket, storageClient } from "../../scripts/stack/storage.ts";

const folder = mkdtempSync(path.join(tmpdir(), "swale-backup-"));
const file = path.join(folder, "all.tar.gz");
const here: Environment = { ...process.env };
const there: Environment = { ...process.env, S3_BUCKET: `${process.env.S3_BUCKET}-there` };
const BYTES = Buffer.from(Array.from({ length: 300_000 }, (_, i) => (i * 7919) % 256));
let connection: Connection;

beforeAll(async () => {
  const name = `swale_there_${process.env.VITEST_POOL_ID}`;
  connection = await mysql.createConnection({ uri: here.DATABASE_URL, multipleStatements: true });
  await connection.query(`drop database if exists ${name}; create database ${name} character set utf8mb4`);
  const url = new URL(here.DATABASE_URL ?? "");
  url.pathname = `/${name}`;
  there.DATABASE_URL = url.href;
  await ensureBucket(there);
  await connection.query(
    `insert into users (id, public_id, user_name, name, email, administrator, created_at) values
     (7, 'u1', 'ada-marsh', 'Ada ‘Marsh’ \\\\ "ß" 🜁', null, 1, '2026-03-04 05:06:07.000008');
     insert into facts (name, value, at) values ('odd', '{"a": 1.50, "b": null}', '2026-01-01 00:00:00');
     insert into jobs (kind, payload, run_at, created_at) values ('none', '"text"', '2026-01-01', '2026-01-01')`,
  );
  await connection.query("insert into rate_limits values ('k', 3, 9007199254740993)");
  const client = storageClient(here);
  for (const key of ["originals/1", "originals/with ümlaut & blank.s1p"]) {
    await client.send(
      new PutObjectCommand({ Bucket: here.S3_BUCKET, Key: key, Body: BYTES, ContentType: "text/x-odd" }),
    );
  }
});
afterAll(async () => {
  await connection.end();
  rmSync(folder, { recursive: true });
});

async function keysIn(environment: Environment): Promise<string[]> {
  const keys: string[] = [];
  for await (const key of keysOf(storageClient(environment), environment.S3_BUCKET ?? "")) keys.push(key);
  return keys;
}

async function contentOf(environment: Environment): Promise<Record<string, unknown[]>> {
  const other = await mysql.createConnection({
    uri: environment.DATABASE_URL,
    dateStrings: true,
    supportBigNumbers: true,
  });
  const [tables] = await other.query<RowDataPacket[]>("show tables");
  const content: Record<string, unknown[]> = {};
  for (const row of tables) {
    const name = String(Object.values(row)[0]);
    const [rows] = await other.query<RowDataPacket[]>(`select * from \`${name}\``);
    content[name] = name === "__drizzle_migrations" ? rows.map(({ hash }) => hash) : rows;
  }
  await other.end();
  return content;
}

test("what comes back is what was there: every row, every byte", async () => {
  expect(await backup(here, file)).toMatch(/4 rows of \d+ tables and 2 files/);
  expect(readdirSync(folder)).toEqual(["all.tar.gz"]);
  expect(await restore(there, file, false)).toContain("4 rows and 2 files");
  expect(await contentOf(there)).toEqual(await contentOf(here));
  const keys = await keysIn(there);
  expect(keys.sort()).toEqual(["originals/1", "originals/with ümlaut & blank.s1p"]);
  const answer = await storageClient(there).send(
    new GetObjectCommand({ Bucket: there.S3_BUCKET, Key: keys[1] }),
  );
  expect(answer.ContentType).toBe("text/x-odd");
  expect(Buffer.from((await answer.Body?.transformToByteArray()) ?? [])).toEqual(BYTES);
});

test("a file that is there is not written over", async () => {
  await expect(backup(here, file)).rejects.toThrow("exists already");
});

test("what is there is kept, unless it is forced away", async () => {
  await connection.query(
    `update ${new URL(there.DATABASE_URL ?? "").pathname.slice(1)}.users set name = 'changed'`,
  );
  const client = storageClient(there);
  await client.send(new PutObjectCommand({ Bucket: there.S3_BUCKET, Key: "extra", Body: "x" }));
  await expect(restore(there, file, false)).rejects.toThrow(/rows in .*users.* and stored files/);
  expect((await contentOf(there)).users).toMatchObject([{ name: "changed" }]);
  await restore(there, file, true);
  expect(await contentOf(there)).toEqual(await contentOf(here));
  expect(await keysIn(there)).not.toContain("extra");
});

test("a damaged backup and something else change nothing", async () => {
  const inside = path.join(folder, "inside");
  mkdirSync(inside);
  spawnSync("tar", ["-xf", file, "-C", inside]);
  appendFileSync(path.join(inside, "tables", "users.jsonl"), '["8"]\n');
  const damaged = path.join(folder, "damaged.tar");
  spawnSync("tar", ["-cf", damaged, "-C", inside, "."]);
  const before = await contentOf(there);
  await expect(restore(there, damaged, true)).rejects.toThrow("tables/users.jsonl is not what it was");
  const empty = path.join(folder, "empty.tar");
  spawnSync("tar", ["-cf", empty, "-T", "/dev/null"]);
  await expect(restore(there, empty, true)).rejects.toThrow("no manifest");
  await expect(restore(there, path.join(folder, "none.tar"), true)).rejects.toThrow("There is no");
  expect(await contentOf(there)).toEqual(before);
});
