import path from "node:path";
import { readMigrationFiles } from "drizzle-orm/migrator";
import mysql, { type Connection, type RowDataPacket } from "mysql2/promise";
import { ROOT } from "../install.mjs";

const FOLDER = path.join(ROOT, "drizzle");
const TABLE = "__drizzle_migrations";
const STEPS = "__swale_migration_steps";
const COLLATION = "utf8mb4_unicode_520_ci";
/**
 * MariaDB commits each change of a table by itself. When a run is killed between such a change and the note of it,
 * the change is found done: table, column, key or constraint exists already, or is gone already.
 */
const DONE_ALREADY = new Set([1050, 1060, 1061, 1826, 1051, 1091]);

/** The note that a migration was begun. */
const BEGUN = -1;

interface Migration {
  sql: string[];
  hash: string;
  folderMillis: number;
}

/**
 * Brings the schema up to date, statement by statement, and goes on where a killed run stopped.
 * `upTo` stops after the migration with that hash. Returns how many migrations were finished.
 */
export async function migrate(databaseUrl: string, upTo?: string): Promise<number> {
  const connection = await mysql.createConnection({ uri: databaseUrl, timezone: "Z", charset: "utf8mb4" });
  try {
    await prepare(connection);
    const done = new Set((await rowsOf(connection, `select hash from ${TABLE}`)).map((row) => row.hash));
    let finished = 0;
    for (const migration of readMigrationFiles({ migrationsFolder: FOLDER }) as Migration[]) {
      if (!done.has(migration.hash)) {
        await apply(connection, migration);
        finished += 1;
      }
      if (migration.hash === upTo) break;
    }
    return finished;
  } finally {
    await connection.end();
  }
}

/** The hashes of the migrations that this version knows, in order. */
export function knownMigrations(): string[] {
  return readMigrationFiles({ migrationsFolder: FOLDER }).map((migration) => migration.hash);
}

/** The hashes of the migrations that a database has, in order. */
export async function appliedMigrations(connection: Connection): Promise<string[]> {
  const tables = await rowsOf(connection, `show tables like '${TABLE}'`);
  if (tables.length === 0) return [];
  return (await rowsOf(connection, `select hash from ${TABLE} order by created_at`)).map((row) => row.hash);
}

async function prepare(connection: Connection): Promise<void> {
  if ((await rowsOf(connection, "show tables")).length === 0) {
    await connection.query(`alter database character set utf8mb4 collate ${COLLATION}`);
  }
  await connection.query(
    `create table if not exists ${TABLE} (id serial primary key, hash text not null, created_at bigint)`,
  );
  await connection.query(
    `create table if not exists ${STEPS} (hash char(64), step int, primary key (hash, step))`,
  );
}

async function apply(connection: Connection, migration: Migration): Promise<void> {
  const { hash } = migration;
  const noted = await rowsOf(connection, `select step from ${STEPS} where hash = ?`, [hash]);
  const done = new Set(noted.map((row) => row.step));
  const resumed = done.has(BEGUN);
  if (!resumed) await connection.query(`insert into ${STEPS} values (?, ?)`, [hash, BEGUN]);
  let tolerant = resumed;
  for (const [step, statement] of migration.sql.entries()) {
    if (done.has(step)) continue;
    await connection.beginTransaction();
    try {
      await connection.query(statement);
    } catch (error) {
      if (!tolerant || !isDoneAlready(error)) throw error;
    }
    // Only the first statement without a note can have been carried out before.
    tolerant = false;
    await connection.query(`insert into ${STEPS} values (?, ?)`, [hash, step]);
    await connection.commit();
  }
  await connection.beginTransaction();
  await connection.query(`insert into ${TABLE} (hash, created_at) values (?, ?)`, [
    hash,
    migration.folderMillis,
  ]);
  await connection.query(`delete from ${STEPS} where hash = ?`, [hash]);
  await connection.commit();
}

function isDoneAlready(error: unknown): boolean {
  const { errno, message } = error as { errno: number; message: string };
  return DONE_ALREADY.has(errno) || (errno === 1005 && message.includes("errno: 121"));
}

async function rowsOf(connection: Connection, sql: string, values: unknown[] = []): Promise<RowDataPacket[]> {
  const [rows] = await connection.query<RowDataPacket[]>(sql, values);
  return rows;
}
