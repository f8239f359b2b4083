import { existsSync, mkdirSync, readdirSync, rmSync } from "node:fs";
import path from "node:path";
import { ROOT } from "../install.mjs";
import { startTicksOf } from "../processes.mjs";
import { freePort } from "../stack/ports.ts";
import { bringUp, type Stack } from "../stack/stack.ts";

const TEST_FOLDER = path.join(ROOT, ".test");

export interface TestStackOptions {
  /** False for database, store and mail without the app. */
  server?: boolean;
  demo?: boolean;
  /** Leaves the data where it is afterwards. */
  keep?: boolean;
}

/**
 * Everything afresh, on free ports, in a folder of its own that goes when it is stopped. The environment of this
 * process then tells tests where it is: SWALE_URL, SWALE_MAIL_URL, SWALE_GITHUB_URL and the app's own variables.
 */
export async function startTestStack({
  server = true,
  demo = true,
  keep = false,
}: TestStackOptions): Promise<Stack> {
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= "true";
  removeOldFolders();
  const folder = path.join(TEST_FOLDER, `${process.pid}-${startTicksOf(process.pid) ?? 0}-${Date.now()}`);
  mkdirSync(folder, { recursive: true });
  const stack = await bringUp({
    folder,
    port: await freePort(),
    environment: { LOG_LEVEL: "warn", BASE_URL: undefined },
    demo,
    server,
    throwaway: true,
    onLoss: (message) => console.error(message),
  });
  Object.assign(process.env, stack.settings.environment, {
    ...(process.env.NODE_ENV ? { NODE_ENV: process.env.NODE_ENV } : {}),
    SWALE_URL: stack.address,
    SWALE_MAIL_URL: stack.settings.environment.LOCAL_INBOX_URL,
    SWALE_GITHUB_URL: stack.settings.environment.GITHUB_BASE_URL,
    SWALE_LOG: path.join(folder, "log", "server.log"),
  });
  const stop = async () => {
    await stack.stop();
    if (!keep) rmSync(folder, { recursive: true, force: true });
  };
  return { ...stack, stop };
}

/** What killed runs left behind: their folders name a process that is gone. */
function removeOldFolders(): void {
  if (!existsSync(TEST_FOLDER)) return;
  for (const name of readdirSync(TEST_FOLDER)) {
    const [, pid, ticks] = /^(\d+)-(\d+)-\d+$/.exec(name) ?? [];
    if (pid && startTicksOf(Number(pid)) !== Number(ticks)) {
      rmSync(path.join(TEST_FOLDER, name), { recursive: true, force: true });
    }
  }
}
