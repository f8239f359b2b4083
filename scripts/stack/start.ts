import path from "node:path";
import { ROOT } from "../install.mjs";
import { areThere, commandParents } from "../processes.mjs";
import type { RunLock } from "../run-lock.mjs";
import { PlainFailure } from "../steps.mjs";
import { stopEveryPart } from "./child.ts";
import { bringUp } from "./stack.ts";

const DEFAULT_PORT = 3000;
const SIGNALS = ["SIGINT", "SIGTERM", "SIGHUP"] as const;

/** Runs until it is asked to stop, or until whoever started it is gone. The last line is the address. */
export async function start({ development, lock }: { development: boolean; lock: RunLock }): Promise<void> {
  const folder = path.join(ROOT, ".data");
  let leaving = false;

  const leave = async (code: number, message?: string) => {
    if (leaving) return;
    leaving = true;
    lock.tell({ leaving: true });
    if (message) console.error(`\n${message}`);
    await stopEveryPart();
    lock.release();
    process.exit(code);
  };
  for (const signal of SIGNALS) process.on(signal, () => void leave(0));
  watchParents(() => void leave(0));

  const port = readPort(process.env.PORT);
  const bringing = bringUp({
    folder,
    port,
    development,
    environment: process.env,
    // A database that was given by environment is somebody's own: no invented people in it unless asked for.
    demo: process.env.SWALE_DEMO ? process.env.SWALE_DEMO === "1" : !process.env.DATABASE_URL,
    onLoss: (message) => void leave(1, `${message}\nEverything else is stopped. The data is safe in .data/.`),
  });
  // Asked to stop while starting: what fails then fails because it was stopped.
  const stack = await bringing.catch((error) => (leaving ? undefined : Promise.reject(error)));
  if (!stack || leaving) return;
  lock.tell({ address: stack.address });
  const { local, environment } = stack.settings;
  if (local.mail) console.log(`  Mails sent are read at ${environment.LOCAL_INBOX_URL}`);
  if (local.github) console.log("  Signing in asks a stand-in for GitHub on this machine");
  console.log(
    `  The log is ${path.relative(ROOT, path.join(folder, "log", "server.log"))}; Ctrl-C stops everything`,
  );
  console.log(`Swale is ready at\n${stack.address}`);
}

function readPort(text: string | undefined): number {
  const port = text ? Number(text) : DEFAULT_PORT;
  if (Number.isInteger(port) && port >= 1 && port <= 65_535) return port;
  throw new PlainFailure(`PORT must be a whole number from 1 to 65535, and is ${text}. Nothing was started.`);
}

/** A killed `npm` tells nobody: when the npm or the shell between is gone, there is nobody left to stop this. */
function watchParents(onGone: () => void): void {
  const parents = commandParents();
  const timer = setInterval(() => {
    if (areThere(parents)) return;
    clearInterval(timer);
    onGone();
  }, 200);
  timer.unref();
}
