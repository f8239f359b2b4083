import { readFileSync } from "node:fs";
import mysql, { type Connection, type RowDataPacket } from "mysql2/promise";
import { afterEach, beforeEach, expect, test } from "vitest";
import { appliedMigrations, knownMigrations, migrate } from "../../scripts/stack/migrate.ts";

let connection: Connection;
let url = "";
const name = `swale_migrate_${process.env.VITEST_POOL_ID}`;

beforeEach(async () => {
  const given = new URL(process.env.DATABASE_URL ?? "");
  given.pathname = "/swale";
  connection = await mysql.createConnection({ uri: given.href });
  await connection.query(`create database ${name} character set latin1`);
  given.pathname = `/${name}`;
  url = given.href;
  await connection.query(`use ${name}`);
});
afterEach(async () => {
  await connection.query(`drop database ${name}`);
  await connection.end();
});

async function schema(): Promise<string[]> {
  const [tables] = await connection.query<RowDataPacket[]>(
    "select table_name as name from information_schema.tables where table_schema = database() and table_name not like '\\_\\_%' order by 1",
  );
  const statements = [];
  for (const { name: table } of tables) {
    const [[row]] = await connection.query<RowDataPacket[]>(`show create table \`${table}\``);
    statements.push(String(row["Create Table"]).replace(/ AUTO_INCREMENT=\d+/, ""));
  }
  return statements;
}

test("brings an empty database up to date, in a character set that holds every letter, once", async () => {
  expect(await migrate(url)).toBe(knownMigrations().length);
  expect(await appliedMigrations(connection)).toEqual(knownMigrations());
  expect(await migrate(url)).toBe(0);
  const [[row]] = await connection.query<RowDataPacket[]>(
    "select default_character_set_name as name from information_schema.schemata where schema_name = database()",
  );
  expect(row.name).toBe("utf8mb4");
  const [withoutKey] = await connection.query<RowDataPacket[]>(
    `select t.table_name from information_schema.tables t left join information_schema.table_constraints c
     on c.table_schema = t.table_schema and c.table_name = t.table_name and c.constraint_type = 'PRIMARY KEY'
     where t.table_schema = database() and (c.constraint_name is null or t.engine <> 'InnoDB')`,
  );
  expect(withoutKey).toEqual([]);
});

test("goes on after a run that was killed at any statement, noted or not", async () => {
  // Each migration is applied by the same steps: the first one stands for all, so that the others need not run each time.
  const hash = knownMigrations()[0];
  await migrate(url, hash);
  const wanted = await schema();
  const journal = JSON.parse(readFileSync("drizzle/meta/_journal.json", "utf8"));
  const first = readFileSync(`drizzle/${journal.entries[0].tag}.sql`, "utf8").split(
    "--> statement-breakpoint",
  );
  for (const carriedOut of [1, Math.floor(first.length / 2), first.length]) {
    for (const noted of [carriedOut, carriedOut - 1]) {
      await connection.query(`drop database ${name}`);
      await connection.query(`create database ${name}`);
      await connection.query(`use ${name}`);
      await connection.query(
        "create table __swale_migration_steps (hash char(64), step int, primary key (hash, step))",
      );
      await connection.query("insert into __swale_migration_steps values (?, -1)", [hash]);
      for (let step = 0; step < carriedOut; step++) {
        await connection.query(first[step]);
        if (step < noted)
          await connection.query("insert into __swale_migration_steps values (?, ?)", [hash, step]);
      }
      expect(await migrate(url, hash)).toBe(1);
      expect(await schema()).toEqual(wanted);
    }
  }
  expect(await migrate(url)).toBe(knownMigrations().length - 1);
}, 120_000);

test("leaves a database alone that holds somebody else's table of the same name", async () => {
  await connection.query("create table users (theirs int primary key)");
  await connection.query("insert into users values (7)");
  await expect(migrate(url)).rejects.toThrow(/users/);
  const [rows] = await connection.query<RowDataPacket[]>("select * from users");
  expect(rows).toEqual([{ theirs: 7 }]);
});
