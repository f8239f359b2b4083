import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "vite";

export default defineConfig({
  plugins: [tailwindcss(), reactRouter()],
  resolve: { tsconfigPaths: true },
  environments: {
    ssr: {
      build: {
        rollupOptions: {
          input: {
            index: "./server.ts",
            worker: "./app/services/reading.worker.ts",
          },
        },
      },
    },
  },
});
