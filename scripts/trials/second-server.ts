import path from "node:path";
import { ROOT } from "../install.mjs";
import { spawnBound } from "../processes.mjs";
import { freePort, LOOPBACK } from "../stack/ports.ts";

export interface SecondServer {
  address: string;
  /** Ends it as a lost machine ends: at once, with nothing put in order. */
  kill: () => Promise<void>;
}

/** Another process of the built product on the database and the store that the environment names. */
export async function startSecondServer(): Promise<SecondServer> {
  const port = await freePort();
  const child = spawnBound(
    process.execPath,
    ["--enable-source-maps", path.join(ROOT, "build", "server", "index.js")],
    {
      cwd: ROOT,
      stdio: "ignore",
      env: {
        ...process.env,
        NODE_ENV: "production",
        BASE_URL: process.env.SWALE_URL,
        PORT: String(port),
        HOST: LOOPBACK,
        LOG_LEVEL: "silent",
      },
    },
  );
  const ended = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  const address = `http://${LOOPBACK}:${port}`;
  const kill = async () => {
    child.kill("SIGKILL");
    await ended;
  };
  const until = Date.now() + PATIENCE_MS;
  while (!(await isReady(address))) {
    if (child.exitCode !== null || Date.now() > until) {
      await kill();
      throw new Error("The second server did not start.");
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return { address, kill };
}

async function isReady(address: string): Promise<boolean> {
  try {
    return (await fetch(`${address}/readyz`, { signal: AbortSignal.timeout(2000) })).ok;
  } catch {
    return false;
  }
}

const PATIENCE_MS = 60_000;
