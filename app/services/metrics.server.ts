import * as jobs from "~/db/jobs.server";

/** Counts kept by this process, in the Prometheus text format, version 0.0.4. */

const BUCKETS_S = [0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5, 10];

/** One series for each class of route and kind of answer: never one an address. */
interface Series {
  count: number;
  sumS: number;
  buckets: number[];
}

const requests = new Map<string, Series>();

export function recordRequest(path: string, method: string, status: number, seconds: number): void {
  const key = `class="${routeClassOf(path)}",method="${METHODS.has(method) ? method : "other"}",status="${Math.floor(status / 100)}xx"`;
  let series = requests.get(key);
  if (!series) {
    series = { count: 0, sumS: 0, buckets: BUCKETS_S.map(() => 0) };
    requests.set(key, series);
  }
  series.count += 1;
  series.sumS += seconds;
  for (const [i, limitS] of BUCKETS_S.entries()) if (seconds <= limitS) series.buckets[i] += 1;
}

export function routeClassOf(path: string): string {
  if (path.startsWith("/assets/")) return "asset";
  if (path.startsWith("/api/")) return "api";
  if (path.startsWith("/plates/") || path === "/oembed") return "plate";
  if (/^\/(healthz|readyz|metrics)$/.test(path)) return "health";
  // Open for hours: by themselves, or no other time could be told.
  if (path.endsWith("/live")) return "stream";
  if (path.endsWith(".data") || path === "/__manifest") return "data";
  return "page";
}

export async function metricsText(): Promise<string> {
  const lines = ["# TYPE swale_request_duration_seconds histogram"];
  for (const [key, series] of requests) {
    const name = "swale_request_duration_seconds";
    for (const [i, limitS] of BUCKETS_S.entries()) {
      lines.push(`${name}_bucket{${key},le="${limitS}"} ${series.buckets[i]}`);
    }
    lines.push(`${name}_bucket{${key},le="+Inf"} ${series.count}`);
    lines.push(`${name}_sum{${key}} ${series.sumS}`, `${name}_count{${key}} ${series.count}`);
  }
  const memory = process.memoryUsage();
  gauge(lines, "process_resident_memory_bytes", memory.rss);
  gauge(lines, "nodejs_heap_used_bytes", memory.heapUsed);
  gauge(lines, "process_uptime_seconds", process.uptime());
  const waiting = await jobs.countAll().catch(() => undefined);
  if (waiting !== undefined) gauge(lines, "swale_jobs_waiting", waiting);
  return `${lines.join("\n")}\n`;
}

const METHODS = new Set(["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE"]);

function gauge(lines: string[], name: string, value: number): void {
  lines.push(`# TYPE ${name} gauge`, `${name} ${value}`);
}
