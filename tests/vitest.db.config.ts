import { defineConfig } from "vitest/config";

/** Tests on a real MariaDB and the local store, both started for this run alone. */
export default defineConfig({
  resolve: { tsconfigPaths: true },
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["tests/**/*.db.test.ts"],
    globalSetup: ["scripts/suites/parts-setup.ts"],
    setupFiles: ["tests/base-url.ts", "tests/worker-schema.ts", "tests/quiet-console.ts"],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    // What is waited for comes at once; a machine with much else to do needs longer.
    expect: { poll: { timeout: 15_000 } },
    // On a busy machine what passes at the second try is told, not hidden.
    retry: process.env.CI ? 1 : 0,
    pool: "forks",
    maxWorkers: 2,
    env: { LOG_LEVEL: "silent", AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true" },
  },
});
