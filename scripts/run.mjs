import { spawn } from "node:child_process";
import { constants } from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { checkNode, installLibraries, ROOT } from "./install.mjs";
import { reportFailure } from "./steps.mjs";

/** `node scripts/run.mjs X.ts …`: runs a TypeScript command. Prints nothing itself on standard output. */
const [script, ...rest] = process.argv.slice(2);
try {
  checkNode();
  // Its notice about Node's age would stand among the answers.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= "true";
  await installLibraries({ quiet: true });
  const loader = pathToFileURL(path.join(ROOT, "node_modules", "tsx", "dist", "loader.mjs")).href;
  const child = spawn(process.execPath, ["--import", loader, path.join(ROOT, "scripts", script), ...rest], {
    stdio: "inherit",
    env: { ...process.env, TSX_TSCONFIG_PATH: path.join(ROOT, "tsconfig.json") },
  });
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => child.kill(signal));
  child.on("error", reportFailure);
  child.on("close", (code, signal) => {
    process.exitCode = code ?? 128 + (constants.signals[signal] ?? 0);
  });
} catch (error) {
  reportFailure(error);
}
