import { parseArgs } from "node:util";
import { startTestStack } from "./suites/test-stack.ts";
import { startSecondServer } from "./trials/second-server.ts";

/**
 * Two processes on one database, many who listen, one process lost half-way:
 * `node scripts/run.mjs live-load.ts [--connections 200] [--rate 20] [--seconds 60]`.
 */
const { values } = parseArgs({
  options: {
    connections: { type: "string", default: "200" },
    rate: { type: "string", default: "20" },
    seconds: { type: "string", default: "60" },
  },
});
process.env.NODE_ENV = "production";
const stack = await startTestStack({ demo: false });
try {
  process.env.BASE_URL = stack.address;
  const second = await startSecondServer();
  const { tryLive } = await import("./trials/live.ts");
  const { pool } = await import("~/db/client.server");
  const outcome = await tryLive({
    servers: [stack.address, second.address],
    connections: Number(values.connections),
    notesPerSecond: Number(values.rate),
    seconds: Number(values.seconds),
    lose: second.kill,
  });
  const ms = (value: number) => `${Math.round(value)} ms`;
  const rows = [
    ["notes written", outcome.notes],
    ["connections", outcome.connections],
    ["had every note once and in order", outcome.whole],
    ["notes missing, over all connections", outcome.missing],
    ["notes that came twice, over all connections", outcome.twice],
    ["connections whose server was lost, and which went on at the other", outcome.resumed],
    ["from commit to browser, of those who stayed, 50th percentile", ms(outcome.p50Ms)],
    ["from commit to browser, of those who stayed, 99th percentile", ms(outcome.p99Ms)],
    ["from commit to browser, of those who stayed, longest", ms(outcome.mostMs)],
    ["the same of those whose server was lost, 50th percentile", ms(outcome.lostP50Ms)],
    ["the same of those whose server was lost, longest", ms(outcome.lostMostMs)],
    ["writing a note, 50th percentile", ms(outcome.writtenP50Ms)],
    ["writing a note, 99th percentile", ms(outcome.writtenP99Ms)],
  ];
  for (const [name, value] of rows) console.log(`${String(name).padEnd(66)} ${value}`);
  await pool.end();
} finally {
  await stack.stop();
}
