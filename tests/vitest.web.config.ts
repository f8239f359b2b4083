import { defineConfig } from "vitest/config";

/** Tests over HTTP against the built server: at SWALE_URL, or started for this run. */
export default defineConfig({
  resolve: { tsconfigPaths: true },
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["tests/web/**/*.test.ts"],
    globalSetup: ["scripts/suites/server-setup.ts"],
    setupFiles: ["tests/base-url.ts", "tests/quiet-console.ts"],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    // What is waited for comes at once; a machine with much else to do needs longer.
    expect: { poll: { timeout: 15_000 } },
    // On a busy machine what passes at the second try is told, not hidden.
    retry: process.env.CI ? 1 : 0,
    pool: "forks",
    // They meet the product from outside: what they import need not be read anew for each file.
    isolate: false,
    maxWorkers: 2,
    env: { AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true" },
  },
});
