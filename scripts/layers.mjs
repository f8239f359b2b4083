import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { circlesIn } from "./circles.mjs";
import { codeOf, filesIn, importsOf, resolveImport } from "./imports.mjs";

/**
 * Fails when an import in app/ points up (routes → services → auth → db → readers → measurement), and when
 * files of app/, scripts/ or server.ts import each other in a circle, if only for a type.
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
  auth: ["db", "readers", "measurement", "env.server.ts", "errors.ts", "context.ts"],
  charts: ["components", "readers", "measurement"],
  // Of auth and services only what has no secrets in it; a `.server` module is refused below.
  components: ["auth", "services", "readers", "measurement", "errors.ts"],
};
/** The packages that pure code may use. Everything else, Node's own modules first, is refused there. */
const PURE = {
  measurement: [],
  readers: ["papaparse"],
};
/** The environment, the clock, chance and the browser, which pure code does not know. */
const IMPURE =
  /(?<![\w.$])(?:process\.|Date\.now|new Date\(\)|Math\.random|performance\.|console\.|document\.|localStorage|fetch\()/;
/** For charts and components, which run in the browser too. */
const IN_BROWSER = /^(?:charts|components)\/|^routes\/.*\/components\//;
const MOST_LINES = 500;

const faults = [...filesIn(APP).flatMap(check), ...circles()];
for (const fault of faults) console.error(fault);
if (faults.length > 0) {
  console.error(`${faults.length} fault${faults.length === 1 ? "" : "s"}: see ARCHITECTURE in DEVELOPERS.md`);
  process.exitCode = 1;
}

function check(file) {
  const from = path.relative(APP, file);
  const source = readFileSync(file, "utf8");
  const code = codeOf(file);
  const layer = from.split("/")[0];
  const found = importsOf(code).flatMap((one) => faultOf(from, layer, one));
  const lines = source.split("\n").length;
  if (lines > MOST_LINES) found.push(`has ${lines} lines, and ${MOST_LINES} are the most`);
  const impure = layer in PURE ? IMPURE.exec(code) : null;
  if (impure) found.push(`is pure code, and uses ${impure[0]}`);
  return found.map((fault) => `app/${from} ${fault}`);
}

function faultOf(from, layer, { target, typeOnly }) {
  const resolved = resolveImport(ROOT, path.join("app", from), target);
  if (resolved === undefined) {
    const bare = target.startsWith("@") ? target.split("/").slice(0, 2).join("/") : target.split("/")[0];
    return layer in PURE && !PURE[layer].includes(bare) ? [`is pure code, and imports ${target}`] : [];
  }
  const found = [];
  const inside = path.relative("app", resolved);
  const to = inside.split("/")[0];
  if (layer in BELOW && to !== layer && !BELOW[layer].includes(to)) {
    found.push(`imports ${target}, which is above it`);
  }
  if (IN_BROWSER.test(from) && /\.server(\.tsx?)?$/.test(inside) && !typeOnly) {
    found.push(`runs in the browser, and imports ${target}`);
  }
  if (layer in PURE && !/\.ts$/.test(target)) found.push(`imports ${target} without its .ts`);
  return found;
}

/** Each circle with all its arrows: which of them should not be is for the reader to see. */
function circles() {
  const server = path.join(ROOT, "server.ts");
  const files = [APP, path.join(ROOT, "scripts")].flatMap(filesIn);
  if (existsSync(server)) files.push(server);
  const arrows = new Map(files.map((file) => [path.relative(ROOT, file), arrowsOf(file)]));
  return circlesIn(arrows).map(
    (circle) => `circle of imports: ${circle.map(([from, to]) => `${from} → ${to}`).join(", ")}`,
  );
}

function arrowsOf(file) {
  const from = path.relative(ROOT, file);
  return [
    ...new Set(importsOf(codeOf(file)).flatMap(({ target }) => resolveImport(ROOT, from, target) ?? [])),
  ];
}
