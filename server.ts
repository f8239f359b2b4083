import { realpathSync } from "node:fs";
import type { Server } from "node:http";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { createRequestHandler } from "@react-router/express";
import compression from "compression";
import express, {
  type Express,
  type NextFunction,
  type Request,
  type RequestHandler,
  type Response,
} from "express";
import { RouterContextProvider } from "react-router";
import { clientAddressContext, nonceContext, requestIdContext } from "~/context";
import { pool } from "~/db/client.server";
import { env } from "~/env.server";
import { accessLog } from "~/services/access-log.server";
import { bodyLimits } from "~/services/body-limits.server";
import { startBundles } from "~/services/bundle/work.server";
import { readiness } from "~/services/health.server";
import { startJobs } from "~/services/jobs.server";
import { knownMethods } from "~/services/known-methods.server";
import { log } from "~/services/log.server";
import { metricsText } from "~/services/metrics.server";
import { oneClick } from "~/services/one-click.server";
import { startOutbox } from "~/services/outbox.server";
import { servePlates } from "~/services/plates/serve.server";
import { closePrinter } from "~/services/printing.server";
import { closeReaders } from "~/services/reading.server";
import { securityHeaders } from "~/services/security-headers.server";
import { onShutdown, runShutdown } from "~/services/shutdown.server";

const PATIENCE_MS = 10_000;
/** A bundle of 2 GB comes in over a line of 2 Mbit/s; heads of requests still have their minute. */
const LONGEST_REQUEST_MS = 3 * 60 * 60 * 1000;
const YEAR = "365d";
/** Pages are drawn anew each time: half the time of the default level for a few per cent more bytes. */
const COMPRESSION_LEVEL = 4;

/** Everything one process answers. Static files are left to Vite in development. */
export function createApp(development = false): Express {
  const app = express();
  app.disable("x-powered-by");
  app.set("trust proxy", env.TRUST_PROXY);
  app.use(accessLog);
  app.get("/healthz", (_request, response) => void response.type("text/plain").send("alive\n"));
  app.get("/readyz", async (_request, response) => {
    const state = await readiness();
    response.status(state.ready ? 200 : 503).json(state);
  });
  app.get("/metrics", async (_request, response) => {
    response.set("Content-Type", "text/plain; version=0.0.4; charset=utf-8").send(await metricsText());
  });
  app.use(securityHeaders(development));
  app.use(oneClick);
  app.use(knownMethods);
  // Packed once and kept so, hence before the compression of everything else.
  app.use(servePlates);
  app.use(bodyLimits);
  app.use(compression({ filter: isWorthCompressing, level: COMPRESSION_LEVEL }));
  if (!development) serveStaticFiles(app);
  app.use(pages(development));
  app.use(answerError);
  return app;
}

/** The framework's own answers. A build that is given once is taken apart once; in development it is asked for each time. */
function pages(development: boolean): RequestHandler {
  const options = {
    mode: env.NODE_ENV,
    getLoadContext(request: Request, response: Response) {
      const context = new RouterContextProvider();
      context.set(nonceContext, response.locals.nonce);
      context.set(requestIdContext, response.locals.requestId);
      context.set(clientAddressContext, request.ip ?? "");
      return context;
    },
  };
  const build = () => import("virtual:react-router/server-build");
  if (development) return createRequestHandler({ ...options, build });
  const ready = build().then((whole) => createRequestHandler({ ...options, build: whole }));
  return async (request, response, next) => (await ready)(request, response, next);
}

/** What runs beside the answering, once a process; the answer stops it. */
export function startBackground(): () => Promise<unknown> {
  onShutdown(() => pool.end());
  onShutdown(closeReaders);
  onShutdown(closePrinter);
  const stops = [startJobs(), startBundles(), startOutbox()];
  return () => Promise.all(stops.map((stop) => stop()));
}

function serveStaticFiles(app: Express): void {
  const client = path.join(path.dirname(fileURLToPath(import.meta.url)), "..", "client");
  // A name under /assets holds the hash of its content, so it may be kept for good, and a missing one is missing.
  app.use(
    "/assets",
    express.static(path.join(client, "assets"), { immutable: true, maxAge: YEAR, fallthrough: false }),
  );
  app.use(express.static(client, { maxAge: "1h", redirect: false }));
}

/** A stream of events must leave at once, so it is not compressed. */
function isWorthCompressing(request: Request, response: Response): boolean {
  if (isEventStream(response)) return false;
  return compression.filter(request, response);
}

function isEventStream(response: Response): boolean {
  return String(response.getHeader("Content-Type")).startsWith("text/event-stream");
}

/** What the router could not answer itself: a malformed address, a missing asset, a fault of ours. */
function answerError(
  error: Error & { status?: number },
  _request: Request,
  response: Response,
  next: NextFunction,
) {
  const status = error.status ?? 500;
  if (status >= 500) log.error({ id: response.locals.requestId, err: error }, "request failed");
  if (response.headersSent) return next(error);
  const words = status >= 500 ? "Something failed here; nothing was changed." : "There is nothing here.";
  response.status(status).type("text/plain").send(`${words} (Request ${response.locals.requestId})\n`);
}

function listen(): void {
  const app = createApp();
  const streams = new Set<Response>();
  const outer = express();
  outer.disable("x-powered-by");
  outer.use((_request, response, next) => {
    streams.add(response);
    response.once("close", () => streams.delete(response));
    next();
  });
  outer.use(app);
  const stopBackground = startBackground();
  const server = outer.listen(env.PORT, env.HOST, (error?: Error) => {
    if (error) {
      log.fatal({ err: error }, `cannot listen on ${env.HOST}:${env.PORT}`);
      process.exit(1);
    }
    log.info({ host: env.HOST, port: env.PORT }, "listening");
  });
  server.keepAliveTimeout = 65_000;
  server.requestTimeout = LONGEST_REQUEST_MS;
  // Side by side, so that both together stay within the patience.
  onShutdown(async () => void (await Promise.all([closeServer(server, streams), stopBackground()])));
  const stop = () => {
    const hardStop = setTimeout(() => process.exit(1), PATIENCE_MS + 3_000);
    runShutdown().then(
      () => process.exit(0),
      (error) => {
        log.error({ err: error }, "stopping failed");
        clearTimeout(hardStop);
        process.exit(1);
      },
    );
  };
  process.once("SIGTERM", stop);
  process.once("SIGINT", stop);
}

/** No new requests; those under way have some seconds; streams of events, which never end, are ended now. */
function closeServer(server: Server, responses: Set<Response>): Promise<void> {
  return new Promise((resolve) => {
    const hurry = setTimeout(() => server.closeAllConnections(), PATIENCE_MS);
    server.close(() => {
      clearTimeout(hurry);
      resolve();
    });
    for (const response of responses) if (isEventStream(response)) response.destroy();
  });
}

const entry = process.argv[1] ? realpathSync(process.argv[1]) : "";
if (entry === fileURLToPath(import.meta.url)) listen();
