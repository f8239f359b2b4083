import { mkdirSync } from "node:fs";
import path from "node:path";
import { CALLBACK_PATH, GITHUB_CLIENT_ID, type LocalParts } from "../stack/settings.ts";
import { startGithub } from "./github.ts";
import { startMail } from "./mail.ts";
import { startStorage } from "./storage.ts";

/** One process with whatever stands in for services outside. It is no part of the app. */
interface Orders {
  folder: string;
  local: LocalParts;
  ports: { storage: number; mail: number; inbox: number; github: number };
  clientSecret: string;
  baseUrl: string;
}

const orders: Orders = JSON.parse(process.env.STAND_INS ?? "{}");
const stops: (() => Promise<void>)[] = [];

if (orders.local.storage) stops.push(await startStorage(folderOf("s3"), orders.ports.storage));
if (orders.local.mail) stops.push(await startMail(folderOf("mail"), orders.ports.mail, orders.ports.inbox));
if (orders.local.github) {
  const callback = new URL(CALLBACK_PATH, orders.baseUrl).href;
  const client = { id: GITHUB_CLIENT_ID, secret: orders.clientSecret, callback };
  stops.push(await startGithub({ folder: folderOf("github"), port: orders.ports.github, clients: [client] }));
}

for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    setTimeout(() => process.exit(0), 3_000).unref();
    Promise.allSettled(stops.map((stop) => stop())).then(() => process.exit(0));
  });
}

function folderOf(name: string): string {
  const folder = path.join(orders.folder, name);
  mkdirSync(folder, { recursive: true });
  return folder;
}
