import { defineConfig } from "vitest/config";

/** Unit and reference tests: no database, no server. `scripts/test.mjs` runs these and the other suites. */
export default defineConfig({
  resolve: { tsconfigPaths: true },
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["tests/**/*.test.{ts,tsx}"],
    exclude: ["**/*.db.test.ts", "tests/web/**", "tests/browser/**"],
    setupFiles: ["tests/base-url.ts", "tests/quiet-console.ts"],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    // What is waited for comes at once; a machine with much else to do needs longer.
    expect: { poll: { timeout: 15_000 } },
    pool: "threads",
    maxWorkers: 2,
    // What app/env.server.ts asks for; nothing answers at these addresses.
    env: {
      DATABASE_URL: "mysql://nobody@127.0.0.1:9/nowhere",
      S3_ENDPOINT: "http://127.0.0.1:9",
      S3_BUCKET: "nowhere",
      S3_ACCESS_KEY_ID: "nobody",
      S3_SECRET_ACCESS_KEY: "nothing",
      SMTP_URL: "smtp://127.0.0.1:9",
      GITHUB_CLIENT_ID: "nobody",
      GITHUB_CLIENT_SECRET: "nothing",
      SESSION_SECRET: "for unit tests only, and for nothing else",
      LOG_LEVEL: "silent",
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true",
    },
  },
});
