import { readFileSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";

export const LOOPBACK = "127.0.0.1";

/** The ports of the local parts: the same as last time where they are still free, so that addresses stay. */
export async function choosePorts<Name extends string>(
  folder: string,
  names: readonly Name[],
): Promise<Record<Name, number>> {
  const file = path.join(folder, "ports.json");
  const before = readJson(file);
  const chosen = {} as Record<Name, number>;
  for (const name of names) {
    const old = before[name];
    chosen[name] = old && (await isFree(old, LOOPBACK)) ? old : await freePort();
  }
  writeFileSync(file, JSON.stringify({ ...before, ...chosen }));
  return chosen;
}

export function isFree(port: number, host: string): Promise<boolean> {
  return new Promise((resolve) => {
    const server = createServer();
    server.once("error", () => resolve(false));
    server.listen(port, host, () => server.close(() => resolve(true)));
  });
}

export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, LOOPBACK, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address ? address.port : 0));
    });
  });
}

function readJson(file: string): Record<string, number | undefined> {
  try {
    return JSON.parse(readFileSync(file, "utf8"));
  } catch {
    return {};
  }
}
