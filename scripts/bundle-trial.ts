import { execFileSync, spawn } from "node:child_process";
import { createReadStream, mkdtempSync, readdirSync, rmSync, statSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { ROOT } from "./install.mjs";
import { startTestStack } from "./suites/test-stack.ts";

/**
 * A bundle there and back, compared field by field, for the demo and for a project of many sweeps; the making of the second
 * is killed half-way and gone on with. `node scripts/run.mjs bundle-trial.ts [sweeps] [--fields] [--without-demo]`
 */
const sweepCount = Number(process.argv[2] ?? 500);
const allFields = process.argv.includes("--fields");
const stack = await startTestStack({ server: false, demo: false });
try {
  const { buildDemo } = await import("./demo/build.ts");
  const { makeFullProject } = await import("./bundles/full-project.ts");
  const projects = await import("~/db/projects.server");
  const people = await import("~/db/people.server");
  const { pool } = await import("~/db/client.server");
  if (!process.argv.includes("--without-demo")) await timed("the demo is built", () => buildDemo());
  const demoIds = await projects.findIdsOfDemo();
  const full = await timed(`a project of ${sweepCount} sweeps is built`, () => makeFullProject(sweepCount));
  const keeper = await people.insert({
    userName: "keeper",
    name: "Keeper",
    email: "keeper@fennmarsh.example",
  });
  for (const id of demoIds) await thereAndBack(`demo project ${id}`, id, keeper, false);
  await thereAndBack(`${sweepCount} sweeps`, full.project.id, keeper, true);
  await pool.end();
} finally {
  await stack.stop();
}

async function thereAndBack(name: string, projectId: number, keeper: number, kill: boolean): Promise<void> {
  const runs = await import("~/db/bundle-runs.server");
  const { askForBundle, giveBundle, offered } = await import("~/services/bundle/runs.server");
  const { workOnBundles } = await import("~/services/bundle/work.server");
  const { getObjectStream } = await import("~/services/storage.server");
  const { pipeline } = await import("node:stream/promises");
  const { createWriteStream } = await import("node:fs");
  console.log(`\n${name}`);
  const asked = await askForBundle(projectId, keeper);
  if (kill) await killHalfWay(asked.run.publicId);
  await timed("made", () => workOnBundles(undefined, kill ? 1 : undefined));
  const offer = offered((await runs.findByPublicId(asked.run.publicId)) as Parameters<typeof offered>[0]);
  if (!offer) throw new Error(JSON.stringify(await runs.findByPublicId(asked.run.publicId)));
  const folder = mkdtempSync(path.join(tmpdir(), "bundle-trial-"));
  try {
    const zip = path.join(folder, "b.zip");
    await pipeline(await getObjectStream(offer.storageKey), createWriteStream(zip));
    console.log(`  ${offer.files} files, ${(statSync(zip).size / 2 ** 20).toFixed(1)} MB`);
    execFileSync("/usr/bin/python3", ["-m", "zipfile", "-e", zip, path.join(folder, "out")]);
    const bag = path.join(folder, "out", readdirSync(path.join(folder, "out"))[0]);
    for (const manifest of ["manifest", "tagmanifest"]) {
      for (const sum of ["sha256", "sha512"]) {
        execFileSync(`${sum}sum`, ["-c", "--quiet", "--strict", `${manifest}-${sum}.txt`], { cwd: bag });
      }
    }
    console.log("  every sum is right: sha256sum and sha512sum -c, both manifests");
    const given = await giveBundle(keeper, createReadStream(zip));
    if (given.kind !== "given") throw new Error(given.kind);
    await timed("taken in", () => workOnBundles());
    const run = await runs.findByPublicId(given.run.publicId);
    if (run?.state !== "done") throw new Error(JSON.stringify(run));
    await report(projectId, run.projectId ?? 0);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function report(one: number, other: number): Promise<void> {
  const { compareProjects, MAY_DIFFER } = await import("./bundles/compare.ts");
  const compared = await compareProjects(one, other);
  for (const { field, rows, different, leftOut, example } of compared) {
    if (!allFields && different === 0) continue;
    const allowed = MAY_DIFFER.has(field) || different === leftOut;
    const word =
      different === 0 ? "equal" : allowed ? `${different} differ, as they must` : `${different} DIFFER`;
    console.log(`  ${field.padEnd(36)} ${String(rows).padStart(7)} ${word} ${example ?? ""}`);
  }
  const values = compared.reduce((sum, { rows }) => sum + rows, 0);
  const wrong = compared.filter(
    ({ field, different, leftOut }) => different > leftOut && !MAY_DIFFER.has(field),
  );
  console.log(`  ${compared.length} fields, ${values} values: ${wrong.length} fields differ`);
  if (wrong.length > 0) process.exitCode = 1;
}

/** Lets another process make the bundle and kills it when half of it is there. */
async function killHalfWay(publicId: string): Promise<void> {
  const runs = await import("~/db/bundle-runs.server");
  const loader = path.join(ROOT, "node_modules", "tsx", "dist", "loader.mjs");
  const env = { ...process.env, TSX_TSCONFIG_PATH: path.join(ROOT, "tsconfig.json") };
  const child = spawn(process.execPath, ["--import", loader, path.join(ROOT, "scripts/bundle-worker.ts")], {
    env,
    stdio: "inherit",
  });
  const gone = new Promise((resolve) => child.on("close", resolve));
  for (;;) {
    await new Promise((resolve) => setTimeout(resolve, 20));
    const run = await runs.findByPublicId(publicId);
    if (run?.state === "done") throw new Error("It was done before it could be killed.");
    if (run && run.allParts > 0 && run.doneParts > run.allParts / 2) break;
  }
  child.kill("SIGKILL");
  await gone;
  const run = await runs.findByPublicId(publicId);
  console.log(`  killed with signal 9 at ${run?.doneParts} of ${run?.allParts} entries`);
}

async function timed<T>(what: string, work: () => Promise<T>): Promise<T> {
  const began = performance.now();
  let most = 0;
  const sample = () => {
    most = Math.max(most, process.memoryUsage().rss);
  };
  sample();
  const timer = setInterval(sample, 20);
  const result = await work();
  clearInterval(timer);
  sample();
  const seconds = ((performance.now() - began) / 1000).toFixed(1);
  console.log(`  ${what}: ${seconds} s, at most ${(most / 2 ** 20).toFixed(0)} MB in memory`);
  return result;
}
