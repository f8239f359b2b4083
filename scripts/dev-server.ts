import { createServer } from "node:http";
import express from "express";
import { createServer as createVite } from "vite";

/** `npm run dev`: the same app through Vite, so that a change shows at once. */
const http = createServer();
const vite = await createVite({ server: { middlewareMode: true, hmr: { server: http } }, appType: "custom" });
const app = express();
app.use(vite.middlewares);
app.use(async (request, response, next) => {
  try {
    const { createApp } = await vite.ssrLoadModule("./server.ts");
    createApp(true)(request, response, next);
  } catch (error) {
    vite.ssrFixStacktrace(error as Error);
    next(error);
  }
});
http.on("request", app);
(await vite.ssrLoadModule("./server.ts")).startBackground();
http.listen(Number(process.env.PORT), process.env.HOST);

for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, async () => {
    http.closeAllConnections();
    await vite.close();
    process.exit(0);
  });
}
