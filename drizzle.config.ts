import { defineConfig } from "drizzle-kit";

export default defineConfig({
  dialect: "mysql",
  schema: "./app/db/schema/index.ts",
  out: "./drizzle",
});
