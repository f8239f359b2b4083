import { existsSync } from "node:fs";
import path from "node:path";
import mysql, { type RowDataPacket } from "mysql2/promise";
import { ROOT } from "../install.mjs";
import { endProcesses, processesWith } from "../processes.mjs";
import { PlainFailure, step } from "../steps.mjs";
import { buildWhereNeeded } from "./build.ts";
import { type Part, runToEnd, startPart, stopPart, TSX_ARGUMENTS, tailOf, waitUntilReady } from "./child.ts";
import { startDatabase } from "./database.ts";
import { migrate } from "./migrate.ts";
import { isFree, LOOPBACK } from "./ports.ts";
import { type Environment, type Settings, settingsFor } from "./settings.ts";
import { ensureBucket } from "./storage.ts";

export interface StackOptions {
  /** Where everything local lives: data, secrets, logs. */
  folder: string;
  port: number;
  environment: Environment;
  demo: boolean;
  development?: boolean;
  /** False for the parts alone, without the app. */
  server?: boolean;
  /** For data that is thrown away afterwards. */
  throwaway?: boolean;
  /** Called once when a part ends that should run. */
  onLoss: (message: string) => void;
}

export interface Stack {
  settings: Settings;
  address: string;
  stop(): Promise<void>;
}

const DEMO = path.join(ROOT, "scripts", "demo", "build.ts");

/** Starts everything in order; what was started is stopped again when a later step fails. */
export async function bringUp(options: StackOptions): Promise<Stack> {
  const { folder, port } = options;
  const parts: Part[] = [];
  const stop = async () => {
    for (const part of parts.toReversed()) await stopPart(part);
  };
  const watch = (part: Part) => {
    parts.push(part);
    part.child.once("exit", () => {
      if (!part.stopping) options.onLoss(`${tailOf(part.logFile)}\n${part.name} ended by itself.`);
    });
  };
  try {
    await endProcesses(processesWith(markOf(folder)));
    const settings = await settingsFor(folder, options.environment, port);
    const { environment, local, ports, secrets } = settings;
    if (options.server !== false) await refuseTakenPort(port, environment.HOST ?? LOOPBACK);
    // They take their time to load, so they begin first and are waited for after the database.
    const standIns =
      local.storage || local.mail || local.github ? startStandIns(folder, settings) : undefined;
    if (standIns) watch(standIns);
    if (local.database) {
      await step("MariaDB", async () =>
        watch(await startDatabase({ folder, port: ports.database, secrets, throwaway: options.throwaway })),
      );
    }
    await step("Database schema", async () => {
      const count = await migrateOrExplain(environment.DATABASE_URL ?? "");
      return count === 0 ? "up to date" : `${count} migration${count === 1 ? "" : "s"}`;
    });
    if (standIns) {
      const names = Object.entries({ S3: local.storage, mail: local.mail, GitHub: local.github });
      const title = `Stand-ins: ${names.flatMap(([name, on]) => (on ? [name] : [])).join(", ")}`;
      await step(title, () => waitForStandIns(standIns, settings));
    }
    await step("Bucket", () => ensureBucket(environment));
    if (options.server === false) return { settings, address: "", stop };
    if (!options.development) await step("Build", () => buildWhereNeeded(folder));
    if (options.demo && existsSync(DEMO)) await step("Demo", () => buildDemo(folder, environment));
    await step("Server", async () => watch(await startServer(options, environment)));
    return { settings, address: environment.BASE_URL ?? "", stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

/** An argument that no program reads: it tells whose process it is, should this one be killed. */
function markOf(folder: string): string {
  return `--belongs-to=${folder}`;
}

async function refuseTakenPort(port: number, host: string): Promise<void> {
  if (await isFree(port, host)) return;
  throw new PlainFailure(
    `Port ${port} on ${host} is taken by another program. Nothing was started. Choose another one: PORT=${port + 1} npm start`,
  );
}

async function migrateOrExplain(databaseUrl: string): Promise<number> {
  try {
    return await migrate(databaseUrl);
  } catch (error) {
    const address = databaseUrl.replace(/\/\/[^@]*@/, "//…@");
    throw new PlainFailure(
      `The schema of ${address} could not be brought up to date: ${(error as Error).message}\nWhat was there is still there. When the cause is gone, the next start goes on where this one stopped.`,
    );
  }
}

function startStandIns(folder: string, settings: Settings): Part {
  return startPart({
    name: "stand-ins",
    folder,
    program: process.execPath,
    arguments: [...TSX_ARGUMENTS, path.join(ROOT, "scripts", "stand-ins", "main.ts"), markOf(folder)],
    environment: {
      ...process.env,
      STAND_INS: JSON.stringify({
        folder,
        local: settings.local,
        ports: settings.ports,
        clientSecret: settings.secrets.githubClientSecret,
        baseUrl: settings.environment.BASE_URL,
      }),
    },
  });
}

async function waitForStandIns(part: Part, settings: Settings): Promise<void> {
  const wanted = [
    settings.local.storage ? settings.ports.storage : 0,
    settings.local.mail ? settings.ports.inbox : 0,
    settings.local.github ? settings.ports.github : 0,
  ].filter((port) => port > 0);
  await waitUntilReady(part, async () => {
    const answers = await Promise.all(wanted.map((port) => answersHttp(`http://${LOOPBACK}:${port}/`)));
    return answers.every((status) => status > 0);
  });
}

/** Once: the demo notes in the database that it is complete, and that note is looked for first. */
async function buildDemo(folder: string, environment: Environment): Promise<string> {
  const connection = await mysql.createConnection({ uri: environment.DATABASE_URL });
  const [found] = await connection.query<RowDataPacket[]>("select 1 from facts where name = 'demo'");
  await connection.end();
  if (found.length > 0) return "there already";
  await runToEnd({
    name: "demo",
    folder,
    program: process.execPath,
    arguments: [...TSX_ARGUMENTS, DEMO],
    environment: { ...process.env, ...environment },
  });
  return "";
}

async function startServer(options: StackOptions, environment: Environment): Promise<Part> {
  const mark = markOf(options.folder);
  const development = options.development === true;
  const part = startPart({
    name: "server",
    folder: options.folder,
    program: process.execPath,
    arguments: development
      ? [...TSX_ARGUMENTS, path.join(ROOT, "scripts", "dev-server.ts"), mark]
      : ["--enable-source-maps", path.join(ROOT, "build", "server", "index.js"), mark],
    environment: { ...process.env, ...environment, ...(development ? { NODE_ENV: "development" } : {}) },
  });
  const host = environment.HOST === "0.0.0.0" || environment.HOST === "::" ? LOOPBACK : environment.HOST;
  await waitUntilReady(
    part,
    async () => (await answersHttp(`http://${host}:${environment.PORT}/readyz`)) === 200,
  );
  return part;
}

/** The status of an answer, 0 where there is none. */
async function answersHttp(url: string): Promise<number> {
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(2_000), redirect: "manual" });
    await response.body?.cancel();
    return response.status;
  } catch {
    return 0;
  }
}
