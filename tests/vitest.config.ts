import { defineConfig } from "vitest/config";

/** Unit and reference tests: pure code, no server. `scripts/test.mjs` runs these and the other suites. */
export default defineConfig({
  resolve: { tsconfigPaths: true },
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["tests/{measurement,readers,charts,auth,services,scripts}/**/*.test.{ts,tsx}"],
    exclude: ["**/*.db.test.ts"],
    testTimeout: 20_000,
    pool: "threads",
    maxWorkers: 2,
  },
});
