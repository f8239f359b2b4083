import path from "node:path";
import { checkNode, installLibraries, installPrograms, ROOT } from "./install.mjs";
import { takeLock } from "./run-lock.mjs";
import { reportFailure } from "./steps.mjs";

/** `npm start` and `npm run dev`: installs what is missing, then hands over to scripts/stack/start.ts. */
let lock;
try {
  checkNode();
  // Its notice about Node's age would stand among the answers.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= "true";
  process.chdir(ROOT);
  lock = await takeLock(path.join(ROOT, ".data"));
  await installPrograms({ database: !process.env.DATABASE_URL, tests: false });
  await installLibraries();
  const { register } = await import("tsx/esm/api");
  register({ tsconfig: path.join(ROOT, "tsconfig.json") });
  const { start } = await import("./stack/start.ts");
  await start({ development: process.argv.includes("--dev"), lock });
} catch (error) {
  lock?.release();
  reportFailure(error);
}
