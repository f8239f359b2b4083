import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { spawnBound } from "./processes.mjs";
import { PlainFailure, step } from "./steps.mjs";

/** Installs what is missing. Plain Node: nothing of node_modules is there yet when this runs. */

export const ROOT = path.dirname(path.dirname(fileURLToPath(import.meta.url)));

const OLDEST_NODE = [20, 19];
const MARIADB = {
  programs: ["mariadbd", "mariadb-install-db", "my_print_defaults"],
  // The programs without the system-wide service that the package mariadb-server would start.
  packages: ["mariadb-server-core", "mariadb-client-core"],
};
/** Chromium without its own windows and menus: the same pages for half the processor time. */
export const BROWSER = "chromium-headless-shell";
const CHROMIUM = { programs: [BROWSER], packages: [BROWSER] };
/** What tests hold our answers against; the tests ask for them at these places. */
const REFERENCES = {
  programs: ["/usr/bin/python3", "/usr/bin/nec2c", "/usr/lib/python3/dist-packages/skrf"],
  packages: ["python3", "nec2c", "python3-scikit-rf"],
};
const SIGNALS = ["SIGINT", "SIGTERM", "SIGHUP"];
const FOLDERS = ["/usr/local/sbin", "/usr/local/bin", "/usr/sbin", "/usr/bin", "/sbin", "/bin"];

export function checkNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major > OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor >= OLDEST_NODE[1])) return;
  throw new PlainFailure(
    `Swale needs Node.js ${OLDEST_NODE.join(".")} or later, and this is ${process.versions.node}. Nothing was changed.`,
  );
}

/** Debian packages for the database (unless one is given by environment) and, for tests, the browser and other readers. */
export async function installPrograms({ database, tests }) {
  const wanted = [database ? [MARIADB] : [], tests ? [CHROMIUM, REFERENCES] : []].flat();
  const missing = wanted.filter((part) => part.programs.some((name) => !findProgram(name)));
  if (missing.length === 0) return;
  const packages = missing.flatMap((part) => part.packages);
  await step(`Debian packages: ${packages.join(", ")}`, () => installPackages(packages));
  for (const name of missing.flatMap((part) => part.programs)) {
    if (!findProgram(name))
      throw new PlainFailure(`${name} is still missing after installing ${packages.join(" ")}.`);
  }
}

/** Where a program is; system folders count even where PATH leaves them out, as it does for most people. */
export function findProgram(name) {
  if (path.isAbsolute(name)) return existsSync(name) ? name : undefined;
  const folders = [...(process.env.PATH ?? "").split(":"), ...FOLDERS];
  return folders.map((folder) => path.join(folder || ".", name)).find((file) => existsSync(file));
}

/** `npm ci` where node_modules is not what package-lock.json says. */
export async function installLibraries({ quiet = false } = {}) {
  if (librariesMatch()) return;
  const work = async () => {
    const npm = process.env.npm_execpath;
    const command = npm?.endsWith(".js") ? [process.execPath, npm] : ["npm"];
    const rest = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
    await run(
      [...command, ...rest],
      "npm packages could not be installed",
      "Is the network there? Then try again.",
    );
  };
  if (quiet) await work();
  else await step("npm packages", work);
}

function librariesMatch() {
  const hidden = path.join(ROOT, "node_modules", ".package-lock.json");
  if (!existsSync(hidden)) return false;
  const installed = JSON.parse(readFileSync(hidden, "utf8")).packages;
  const wanted = JSON.parse(readFileSync(path.join(ROOT, "package-lock.json"), "utf8")).packages;
  return Object.entries(wanted).every(
    ([name, entry]) =>
      name === "" || (installed[name] ? installed[name].version === entry.version : entry.optional === true),
  );
}

async function installPackages(packages) {
  const apt = findProgram("apt-get");
  const sudo = process.getuid?.() === 0 ? [] : ["sudo", "-n"];
  const command = `sudo apt-get update && sudo apt-get install -y --no-install-recommends ${packages.join(" ")}`;
  const advice = `Install it yourself with\n\n  ${command}\n\nand run the same command again. (With DATABASE_URL set to a MariaDB of your own, none is installed.)`;
  if (!apt)
    throw new PlainFailure(
      `Missing: ${packages.join(", ")}, and there is no apt-get here. Nothing was changed.`,
    );
  if (sudo.length > 0 && spawnSync("sudo", ["-n", "true"], { stdio: "ignore" }).status !== 0) {
    throw new PlainFailure(
      `Missing: ${packages.join(", ")}. Installing needs root, or sudo without a password, and neither is here. ${advice}`,
    );
  }
  const asRoot = [
    ...sudo,
    "env",
    "DEBIAN_FRONTEND=noninteractive",
    apt,
    "-q",
    "-o",
    "DPkg::Lock::Timeout=120",
  ];
  const install = () =>
    run(
      [...asRoot, "install", "-y", "--no-install-recommends", ...packages],
      "apt-get install failed",
      advice,
    );
  await run([...asRoot, "update"], "apt-get update failed", advice);
  await install().catch(async () => {
    // A killed installation leaves packages half configured; this finishes them.
    await run([...sudo, "dpkg", "--configure", "-a"], "dpkg --configure -a failed", advice);
    await install();
  });
}

/** Runs a command with its output kept; only a failure shows the end of it. */
function run([program, ...rest], failure, advice) {
  return new Promise((resolve, reject) => {
    const child = spawnBound(program, rest, { cwd: ROOT, stdio: ["ignore", "pipe", "pipe"] });
    const stop = (signal) => {
      child.kill(signal);
      child.once("close", () => process.exit(1));
    };
    for (const signal of SIGNALS) process.once(signal, stop);
    const output = [];
    child.stdout.on("data", (chunk) => output.push(chunk));
    child.stderr.on("data", (chunk) => output.push(chunk));
    child.on("error", (error) => reject(new PlainFailure(`${failure}: ${error.message}. ${advice}`)));
    child.on("close", (code) => {
      for (const signal of SIGNALS) process.off(signal, stop);
      if (code === 0) return resolve();
      const text = Buffer.concat(output).toString();
      const folder = path.join(ROOT, ".data");
      mkdirSync(folder, { recursive: true });
      writeFileSync(path.join(folder, "install.log"), text);
      reject(
        new PlainFailure(
          `${text.split("\n").slice(-25).join("\n")}\n${failure}. ${advice}\nAll of it: .data/install.log`,
        ),
      );
    });
  });
}
