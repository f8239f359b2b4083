import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { parseArgs } from "node:util";
import { ROOT } from "./install.mjs";
import { readLock } from "./run-lock.mjs";
import { ENVIRONMENT_FILE } from "./stack/settings.ts";
import { PlainFailure, reportFailure } from "./steps.mjs";

const USAGE = `Usage: npm run admin -- COMMAND
  create-user --email E --name N [--administrator]
  create-token --email E --scope read|write [--label L]
  backup FILE              all tables and all stored files, with checksums, as one tar (.tar, .tar.gz)
  restore FILE [--force]   into an empty database and bucket; --force empties them first
  migrate                  brings the schema of DATABASE_URL up to date`;

class UsageFailure extends PlainFailure {}

try {
  await run(process.argv.slice(2));
} catch (error) {
  reportFailure(error);
  if (error instanceof UsageFailure) process.exitCode = 2;
}

async function run(given: string[]): Promise<void> {
  const { positionals, values } = readArguments(given);
  const [command, ...rest] = positionals;
  const file = () => {
    if (rest.length !== 1) throw new UsageFailure(`${command} needs one FILE.\n${USAGE}`);
    return path.resolve(rest[0]);
  };
  const needed = (name: "email" | "name" | "scope") => {
    const value = values[name]?.trim();
    if (!value) throw new UsageFailure(`${command} needs --${name}.\n${USAGE}`);
    return value;
  };
  switch (command) {
    case "create-user": {
      const user = { email: needed("email"), name: needed("name"), administrator: values.administrator };
      takeEnvironment();
      const { createUser } = await import("./admin/accounts.ts");
      console.log(await createUser(user));
      break;
    }
    case "create-token": {
      const scope = needed("scope");
      if (scope !== "read" && scope !== "write") throw new UsageFailure("--scope is read or write.");
      const email = needed("email");
      takeEnvironment();
      const { createToken } = await import("./admin/accounts.ts");
      console.log(await createToken(email, scope, values.label));
      break;
    }
    case "backup": {
      const to = file();
      const { backup } = await import("./admin/backup.ts");
      console.log(await backup(takeEnvironment(), to));
      break;
    }
    case "restore": {
      const from = file();
      const { restore } = await import("./admin/restore.ts");
      console.log(await restore(takeEnvironment(), from, values.force));
      break;
    }
    case "migrate": {
      const { migrate } = await import("./stack/migrate.ts");
      console.log(`${await migrate(takeEnvironment().DATABASE_URL ?? "")} migrations done.`);
      break;
    }
    default:
      throw new UsageFailure(command ? `There is no command ${command}.\n${USAGE}` : USAGE);
  }
  // The app's pool of connections would keep this process for a while.
  process.exit();
}

function readArguments(given: string[]) {
  try {
    return parseArgs({
      args: given,
      allowPositionals: true,
      options: {
        email: { type: "string" },
        name: { type: "string" },
        administrator: { type: "boolean", default: false },
        scope: { type: "string" },
        label: { type: "string", default: "made on the command line" },
        force: { type: "boolean", default: false },
      },
    });
  } catch (error) {
    throw new UsageFailure(`${(error as Error).message}\n${USAGE}`);
  }
}

/** What is given by environment, else the local parts, which run while `npm start` does. */
function takeEnvironment(): NodeJS.ProcessEnv {
  if (!process.env.DATABASE_URL) {
    const folder = path.join(ROOT, ".data");
    const file = path.join(folder, ENVIRONMENT_FILE);
    if (!readLock(folder) || !existsSync(file)) {
      throw new PlainFailure(
        "The local database is not running. Start it with `npm start` in another window, or set DATABASE_URL and the S3_ variables. Nothing was changed.",
      );
    }
    const local: Record<string, string> = JSON.parse(readFileSync(file, "utf8"));
    for (const [name, value] of Object.entries(local)) process.env[name] ||= value;
  }
  return process.env;
}
