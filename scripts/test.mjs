import path from "node:path";
import { checkNode, installLibraries, installPrograms, ROOT } from "./install.mjs";
import { reportFailure } from "./steps.mjs";

/** `npm test`: installs what is missing, then hands over to scripts/suites/main.ts. */
try {
  checkNode();
  process.chdir(ROOT);
  // Its notice about Node's age would fail the tests, in which nothing may be printed.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= "true";
  await installPrograms({ database: true, tests: true });
  await installLibraries();
  const { register } = await import("tsx/esm/api");
  register({ tsconfig: path.join(ROOT, "tsconfig.json") });
  const { test } = await import("./suites/main.ts");
  process.exitCode = await test(process.argv.slice(2));
} catch (error) {
  reportFailure(error);
  console.log("0 passed, 1 failed");
}
