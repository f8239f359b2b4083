import { rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import mysql, { type RowDataPacket } from "mysql2/promise";
import type { PlateRecord } from "../../app/services/plates/record.ts";
import { ROOT } from "../install.mjs";
import { PlainFailure } from "../steps.mjs";
import type { BenchRow } from "./bench-row.ts";

const CACHED_GOAL = 1.5;
const SVG_GOAL_MS = 150;
const PNG_GOAL_MS = 1500;
const ROUNDS = 300;
const WARM_UP = 60;

/** A plate of the demo: served from memory against a static file of the same bytes, and drawn for the first time. */
export async function benchPlates(
  address: string,
  environment: Record<string, string | undefined>,
): Promise<BenchRow[]> {
  const record = await firstPlate(environment.DATABASE_URL ?? "");
  const rows: BenchRow[] = [];
  for (const ending of ["svg", "png"]) {
    const value = await againstStatic(address, `/plates/${record.id}.${ending}`, ending);
    rows.push({
      name: `cached plate against a static file of its bytes, ${ending}`,
      value,
      goal: CACHED_GOAL,
      unit: "×",
    });
  }
  return [...rows, ...(await firstDrawing(record, environment))];
}

async function firstPlate(databaseUrl: string): Promise<PlateRecord> {
  const connection = await mysql.createConnection({ uri: databaseUrl });
  const [rows] = await connection.query<RowDataPacket[]>(
    "select record from plates where withdrawn_at is null order by id limit 1",
  );
  await connection.end();
  if (rows.length === 0) throw new PlainFailure("The demo has no plate to measure with.");
  return JSON.parse(rows[0].record);
}

/** Medians of both in turn, one request at a time, as a ratio. */
async function againstStatic(address: string, plate: string, ending: string): Promise<number> {
  const bytes = Buffer.from(await (await fetch(address + plate)).arrayBuffer());
  const name = `bench-plate.${ending}`;
  const file = path.join(ROOT, "build", "client", "assets", name);
  writeFileSync(file, bytes);
  try {
    const urls = [address + plate, `${address}/assets/${name}`];
    const times: number[][] = urls.map(() => []);
    for (let round = -WARM_UP; round < ROUNDS; round++) {
      for (const [i, url] of urls.entries()) {
        const started = performance.now();
        const response = await fetch(url);
        const size = (await response.arrayBuffer()).byteLength;
        if (!response.ok || size !== bytes.length) throw new PlainFailure(`${url} did not give the plate.`);
        if (round >= 0) times[i].push(performance.now() - started);
      }
    }
    const [ofPlate, ofFile] = times.map((list) => list.sort((a, b) => a - b)[Math.floor(ROUNDS / 2)]);
    return ofPlate / ofFile;
  } finally {
    rmSync(file, { force: true });
  }
}

/** In this process, which has drawn nothing yet: fonts are unpacked and code is warmed within these times. */
async function firstDrawing(
  record: PlateRecord,
  environment: Record<string, string | undefined>,
): Promise<BenchRow[]> {
  process.env.NODE_ENV = "production";
  Object.assign(process.env, environment);
  const { drawFigure } = await import("../../app/services/plates/draw.server.tsx");
  const { renderPng } = await import("../../app/services/plates/render-png.server.ts");
  const started = performance.now();
  const svg = drawFigure(record, { theme: "light" });
  const drawn = performance.now();
  await renderPng(svg, 1280);
  const rendered = performance.now();
  return [
    { name: "plate, first rendering as SVG", value: drawn - started, goal: SVG_GOAL_MS, unit: "ms" },
    { name: "plate, first rendering as PNG 1280 px", value: rendered - drawn, goal: PNG_GOAL_MS, unit: "ms" },
  ];
}
