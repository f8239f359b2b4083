import { existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

/**
 * Fails when an import in app/ points up: routes → auth, services → db → readers → measurement.
 * `node scripts/layers.mjs [folder with an app/]`
 */
const ROOT = path.resolve(process.argv[2] ?? path.dirname(path.dirname(fileURLToPath(import.meta.url))));
const APP = path.join(ROOT, "app");

/** What each layer may import from app/, besides itself. */
const BELOW = {
  measurement: [],
  readers: ["measurement"],
  db: ["readers", "measurement", "env.server.ts"],
  services: ["auth", "db", "readers", "measurement", "charts", "env.server.ts", "errors.ts"],
  auth: ["services", "db", "readers", "measurement", "env.server.ts", "errors.ts", "context.ts"],
  charts: ["components", "readers", "measurement"],
  // Of auth and services only what has no secrets in it; a `.server` module is refused below.
  components: ["charts", "auth", "services", "readers", "measurement", "errors.ts", "root.tsx"],
};
/** The packages that pure code may use. Everything else, Node's own modules first, is refused there. */
const PURE = {
  measurement: [],
  readers: ["papaparse"],
};
/** The environment, the clock, chance and the browser, which pure code does not know. */
const IMPURE =
  /(?<![\w.$])(?:process\.|Date\.now|new Date\(\)|Math\.random|performance\.|console\.|document\.|localStorage|fetch\()/;
/** The words for roles, which rows carry too. */
const VOCABULARY = "auth/permissions.ts";
/** For charts and components, which run in the browser too. */
const IN_BROWSER = /^(?:charts|components)\/|^routes\/.*\/components\//;
const MOST_LINES = 500;

const faults = filesIn(APP).flatMap(check);
for (const fault of faults) console.error(fault);
if (faults.length > 0) {
  console.error(`${faults.length} fault${faults.length === 1 ? "" : "s"}: see ARCHITECTURE in DEVELOPERS.md`);
  process.exitCode = 1;
}

function check(file) {
  const from = path.relative(APP, file);
  const source = readFileSync(file, "utf8");
  const code = withoutComments(source);
  const layer = from.split("/")[0];
  const found = importsOf(code).flatMap((one) => faultOf(from, layer, one));
  const lines = source.split("\n").length;
  if (lines > MOST_LINES) found.push(`has ${lines} lines, and ${MOST_LINES} are the most`);
  const impure = layer in PURE ? IMPURE.exec(code) : null;
  if (impure) found.push(`is pure code, and uses ${impure[0]}`);
  return found.map((fault) => `app/${from} ${fault}`);
}

function faultOf(from, layer, { target, typeOnly }) {
  const inside = resolve(from, target);
  if (inside === undefined) {
    const bare = target.startsWith("@") ? target.split("/").slice(0, 2).join("/") : target.split("/")[0];
    return layer in PURE && !PURE[layer].includes(bare) ? [`is pure code, and imports ${target}`] : [];
  }
  const found = [];
  const to = inside.split("/")[0];
  if (layer === "db" && typeOnly && inside === VOCABULARY) return [];
  if (layer in BELOW && to !== layer && !BELOW[layer].includes(to) && !(typeOnly && layer === "components")) {
    found.push(`imports ${target}, which is above it`);
  }
  if (IN_BROWSER.test(from) && /\.server(\.tsx?)?$/.test(inside) && !typeOnly) {
    found.push(`runs in the browser, and imports ${target}`);
  }
  if (layer in PURE && !/\.ts$/.test(target)) found.push(`imports ${target} without its .ts`);
  return found;
}

/** The path inside app/, undefined for a package. */
function resolve(from, target) {
  if (target.startsWith("~/")) return nameOf(target.slice(2));
  if (target.startsWith(".")) return nameOf(path.join(path.dirname(from), target));
  return undefined;
}

function nameOf(name) {
  const endings = ["", ".ts", ".tsx"];
  return (
    endings
      .map((ending) => name + ending)
      .find((one) => /\.\w+$/.test(one) && existsSync(path.join(APP, one))) ?? name
  );
}

function importsOf(code) {
  const found = [];
  for (const [, typeWord, names = "", target] of code.matchAll(
    /\b(?:import|export)\s+(type\s+)?(?:([^"';]*?)\s*\bfrom\s*)?["']([^"']+)["']/g,
  )) {
    const inBraces = /^\{([^}]*)\}$/.exec(names.trim())?.[1];
    const parts = inBraces?.split(",").filter((part) => part.trim() !== "");
    const typeOnly = typeWord !== undefined || (parts?.every((part) => /^\s*type\s/.test(part)) ?? false);
    found.push({ target, typeOnly });
  }
  for (const [, target] of code.matchAll(/\bimport\(\s*["']([^"']+)["']/g))
    found.push({ target, typeOnly: false });
  return found;
}

function withoutComments(source) {
  return source.replace(/\/\*[\s\S]*?\*\//g, "").replace(/(^|\s)\/\/.*$/gm, "$1");
}

function filesIn(folder) {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const full = path.join(folder, entry.name);
    if (entry.isDirectory()) return filesIn(full);
    return /\.tsx?$/.test(entry.name) && !entry.name.endsWith(".d.ts") ? [full] : [];
  });
}
