import pino from "pino";
import { env } from "~/env.server";

/** The server's log, on standard error, one JSON object a line. */
export const log = pino({ level: env.LOG_LEVEL, base: null }, pino.destination(2));
