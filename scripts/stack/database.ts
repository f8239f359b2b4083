import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import mysql from "mysql2/promise";
import { findProgram } from "../install.mjs";
import { endProcesses, processesWith } from "../processes.mjs";
import { PlainFailure } from "../steps.mjs";
import { type Part, startPart, waitUntilReady } from "./child.ts";
import { LOOPBACK } from "./ports.ts";
import type { Secrets } from "./secrets.ts";

export const DATABASE_NAME = "swale";
const COLLATION = "utf8mb4_unicode_520_ci";

export interface DatabaseOptions {
  folder: string;
  port: number;
  secrets: Secrets;
  /** For data that is thrown away: nothing waits for the disk. */
  throwaway?: boolean;
}

/** A MariaDB of our own on loopback. What a killed run left of it is stopped first. */
export async function startDatabase({ folder, port, secrets, throwaway }: DatabaseOptions): Promise<Part> {
  const dataFolder = path.join(folder, "mariadb");
  await stopDatabaseOf(folder);
  if (!existsSync(dataFolder)) installData(dataFolder);
  const initFile = path.join(folder, "mariadb-init.sql");
  writeFileSync(initFile, initStatements(secrets), { mode: 0o600 });
  const part = startPart({
    name: "mariadb",
    folder,
    program: findProgram("mariadbd") ?? "mariadbd",
    arguments: [
      "--no-defaults",
      ...asRoot(),
      `--datadir=${dataFolder}`,
      `--socket=${socketOf(dataFolder)}`,
      `--bind-address=${LOOPBACK}`,
      `--port=${port}`,
      `--init-file=${initFile}`,
      "--skip-name-resolve",
      "--character-set-server=utf8mb4",
      `--collation-server=${COLLATION}`,
      "--default-time-zone=+00:00",
      "--max-allowed-packet=64M",
      ...(throwaway ? ["--innodb-flush-method=nosync", "--debug-no-sync"] : []),
    ],
  });
  await waitUntilReady(part, () => answers(databaseUrl(port, secrets)));
  return part;
}

export async function stopDatabaseOf(folder: string): Promise<void> {
  await endProcesses(processesWith(`--datadir=${path.join(folder, "mariadb")}`), 60_000);
}

export function databaseUrl(port: number, secrets: Secrets, name = DATABASE_NAME): string {
  return `mysql://swale:${secrets.databasePassword}@${LOOPBACK}:${port}/${name}`;
}

/** Installed beside its place and moved there whole, so that a killed installation is never taken for one. */
function installData(dataFolder: string): void {
  const fresh = `${dataFolder}.new`;
  rmSync(fresh, { recursive: true, force: true });
  mkdirSync(fresh, { recursive: true });
  const program = findProgram("mariadb-install-db") ?? "mariadb-install-db";
  const result = spawnSync(
    program,
    [
      "--no-defaults",
      ...asRoot(),
      `--datadir=${fresh}`,
      "--auth-root-authentication-method=normal",
      "--skip-test-db",
      "--skip-name-resolve",
    ],
    { encoding: "utf8" },
  );
  if (result.status !== 0) {
    throw new PlainFailure(
      `${result.stdout}\n${result.stderr}\nThe database could not be laid out in ${dataFolder}.`,
    );
  }
  renameSync(fresh, dataFolder);
}

/** Run by the server at each start, before it answers anybody: everything here may be said twice. */
function initStatements(secrets: Secrets): string {
  const user = `'swale'@'${LOOPBACK}'`;
  return [
    "DELETE FROM mysql.global_priv WHERE User = '';",
    "FLUSH PRIVILEGES;",
    `ALTER USER 'root'@'localhost' IDENTIFIED BY '${secrets.databaseRootPassword}';`,
    "DELETE FROM mysql.global_priv WHERE User = 'root' AND Host <> 'localhost';",
    `CREATE USER IF NOT EXISTS ${user} IDENTIFIED BY '${secrets.databasePassword}';`,
    `ALTER USER ${user} IDENTIFIED BY '${secrets.databasePassword}';`,
    `CREATE DATABASE IF NOT EXISTS ${DATABASE_NAME} CHARACTER SET utf8mb4 COLLATE ${COLLATION};`,
    `GRANT ALL ON \`${DATABASE_NAME}%\`.* TO ${user};`,
    "FLUSH PRIVILEGES;",
    "",
  ].join("\n");
}

/** In the temporary folder under a short name: a socket's path may have 107 characters at most. */
function socketOf(dataFolder: string): string {
  const name = createHash("sha256").update(dataFolder).digest("hex").slice(0, 16);
  const folder = tmpdir().length > 60 ? "/tmp" : tmpdir();
  return path.join(folder, `swale-${name}.sock`);
}

function asRoot(): string[] {
  return process.getuid?.() === 0 ? ["--user=root"] : [];
}

async function answers(url: string): Promise<boolean> {
  try {
    const connection = await mysql.createConnection({ uri: url, connectTimeout: 1_000 });
    await connection.query("select 1");
    await connection.end();
    return true;
  } catch {
    return false;
  }
}
