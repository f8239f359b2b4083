import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig, type Plugin } from "vite";

export default defineConfig({
  plugins: [tailwindcss(), reactRouter(), serverEntriesByName()],
  resolve: { tsconfigPaths: true },
  environments: {
    ssr: {
      build: {
        rollupOptions: {
          input: {
            index: "./server.ts",
            reading: "./app/services/reading.worker.ts",
            printing: "./app/services/printing.worker.ts",
          },
        },
      },
    },
  },
});

/** The router names every server entry `index.js`; the workers must be found under their own names. */
function serverEntriesByName(): Plugin {
  return {
    name: "server-entries-by-name",
    enforce: "post",
    applyToEnvironment: (environment) => environment.name === "ssr",
    outputOptions: (options) => ({ ...options, entryFileNames: "[name].js" }),
  };
}
