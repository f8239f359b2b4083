import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { circlesIn } from "./circles.mjs";
import { codeOf, filesIn, importsOf, resolveImport } from "./imports.mjs";

/**
 * What is wrong below `root`, a sentence each: an import in app/ that points up (routes → services → auth → db →
 * readers → measurement), and files of app/, scripts/ and server.ts that import each other in a circle, if only for a type.
 */
export function layerFaults(root) {
  return [...filesIn(path.join(root, "app")).flatMap((file) => check(root, file)), ...circles(root)];
}

function check(root, file) {
  const from = path.relative(path.join(root, "app"), file);
  const source = readFileSync(file, "utf8");
  const code = codeOf(file);
  const layer = from.split("/")[0];
  const found = importsOf(code).flatMap((one) => faultOf(root, from, layer, one));
  const lines = source.split("\n").length;
  if (lines > MOST_LINES) found.push(`has ${lines} lines, and ${MOST_LINES} are the most`);
  const impure = layer in PURE ? IMPURE.exec(code) : null;
  if (impure) found.push(`is pure code, and uses ${impure[0]}`);
  return found.map((fault) => `app/${from} ${fault}`);
}

function faultOf(root, from, layer, { target, typeOnly }) {
  const resolved = resolveImport(root, path.join("app", from), target);
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
function circles(root) {
  const server = path.join(root, "server.ts");
  const files = ["app", "scripts"].flatMap((folder) => filesIn(path.join(root, folder)));
  if (existsSync(server)) files.push(server);
  const arrows = new Map(files.map((file) => [path.relative(root, file), arrowsOf(root, file)]));
  return circlesIn(arrows).map(
    (circle) => `circle of imports: ${circle.map(([from, to]) => `${from} → ${to}`).join(", ")}`,
  );
}

function arrowsOf(root, file) {
  const from = path.relative(root, file);
  return [
    ...new Set(importsOf(codeOf(file)).flatMap(({ target }) => resolveImport(root, from, target) ?? [])),
  ];
}

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
