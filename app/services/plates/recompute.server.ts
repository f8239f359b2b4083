import type { PlateSourceRow } from "~/db/plates.server";
import { analyse } from "~/measurement/analyse";
import type { BenchForCorrection, BenchReferences } from "~/measurement/correction/references";
import type { ReadAs } from "~/measurement/correction/scale-faults";
import { pairDips } from "~/measurement/match-dips";
import { DEFAULT_SETTINGS, type Sweep } from "~/measurement/sweep";
import type { Reading } from "~/readers/reading";
import { correctAsRead, readAsOf } from "../correction.server.ts";
import { decodePoints } from "../points.server.ts";
import { readFile } from "../reading.server.ts";
import { uncorrected } from "../shown-sweep.server.ts";
import { getObject, sha256Of } from "../storage.server.ts";
import { NO_MEANS } from "../sweep-corrections.server.ts";
import type { Difference } from "./differences.ts";
import type { Material, MaterialDip, MaterialSweep } from "./material.ts";
import { parseRecipe, type Recipe, type RecipeBench } from "./recipe.ts";
import type { PlateRecord } from "./record.ts";
import { BENCH_WISH } from "./wish.ts";

export interface Recomputed {
  material: Material;
  analyse: typeof analyse;
}

interface Read {
  row: PlateSourceRow;
  recipe: Recipe;
  points: Sweep;
  reading: Reading;
}

/** What a plate is computed from, read anew from its originals; or what of them is missing or can't be read any more. */
export async function recompute(
  record: PlateRecord,
  rows: readonly PlateSourceRow[],
  method: Recomputed["analyse"] = analyse,
): Promise<{ material: Material } | { missing: Difference[] }> {
  const read: Read[] = [];
  const missing: Difference[] = [];
  // One after another: each holds a whole file.
  for (const row of rows) {
    const one = await readOriginal(row);
    if ("why" in one) missing.push(one);
    else read.push(one);
  }
  if (missing.length > 0) return { missing };
  const sweeps = read.filter(({ row }) => row.role === "sweep");
  const { figure, choices, kind } = record;
  const bench = kind === "bench" ? (read[0]?.recipe.bench ?? null) : null;
  const order = figure.traces.map(({ id }) => id);
  const place = ({ row }: Read) => order.indexOf(row.sweep);
  return {
    material: {
      kind,
      choices,
      sweeps: [...sweeps]
        .sort((a, b) => place(a) - place(b))
        .map((one) => sweepOf(one, read, record, method)),
      focus: figure.focus,
      bands: figure.bands,
      trails: figure.trails,
      steps: figure.steps,
      bench: bench && { correction: benchOf(bench, read).bench, wish: BENCH_WISH },
    },
  };
}

async function readOriginal(row: PlateSourceRow): Promise<Read | Difference> {
  const what = `the original ${row.name}`;
  const recipe = parseRecipe(row.recipe);
  const bytes = await getObject(row.storageKey).catch((error) => {
    if ((error as { name?: string }).name === "NoSuchKey") return undefined;
    throw error;
  });
  if (!bytes) return { what, frozen: "there", now: "missing", why: "The store does not have it any more." };
  const sha256 = sha256Of(bytes);
  if (sha256 !== row.sha256) {
    return { what, frozen: row.sha256, now: sha256, why: "The store holds other bytes than were given." };
  }
  const settings = recipe.analysis?.settings ?? DEFAULT_SETTINGS;
  const outcome = await readFile({ name: row.name, bytes, given: recipe.given, settings });
  if (!outcome.ok) {
    return {
      what,
      frozen: "read",
      now: "not read",
      why: `Reading it again failed: ${outcome.problem.message}`,
    };
  }
  const points = decodePoints(outcome.parts.map((part) => Buffer.from(part)));
  return { row, recipe, points, reading: outcome.reading };
}

function sweepOf(
  one: Read,
  all: readonly Read[],
  record: PlateRecord,
  method: typeof analyse,
): MaterialSweep {
  const { row, recipe, points, reading } = one;
  const { settings, plane, feedline } = recipe.analysis ?? {
    settings: DEFAULT_SETTINGS,
    plane: "instrument" as const,
    feedline: null,
  };
  const bench = recipe.bench && benchOf(recipe.bench, all);
  const task = { bench: bench?.bench ?? null, readAs: bench?.readAs ?? {}, feedline, plane };
  const done = correctAsRead(points, reading, task);
  const { dips } = method(done.sweep, settings);
  const trace = record.figure.traces.find(({ id }) => id === row.sweep);
  const correction = done.correction && { ...done.correction, bench: null, references: {}, feedline };
  return {
    id: row.sweep,
    label: trace?.label ?? "",
    caption: trace?.caption ?? "",
    points: done.sweep,
    measured: uncorrected({ ...done, correction, means: NO_MEANS, tried: false }) ?? null,
    swrLimit: settings.swrLimit,
    dips: named(dips, row.sweep, record),
  };
}

/** Each dip under the name that it was frozen by: the nearest one of its sweep, within a per cent. */
function named(
  dips: ReturnType<typeof analyse>["dips"],
  sweep: string,
  { figure }: PlateRecord,
): MaterialDip[] {
  const frozen = figure.dips.filter(({ trace }) => trace === sweep);
  const pairs = pairDips(
    frozen.map(({ frequencyHz }) => frequencyHz),
    dips.map(({ frequencyHz }) => frequencyHz),
    (hz) => hz * GATE_SHARE,
  );
  return dips.map((dip, j) => {
    const known = frozen[pairs.indexOf(j)];
    const { id, label, verdict } = known ?? { id: `new-${j + 1}`, label: "", verdict: "" };
    return { ...dip, id, label, verdict };
  });
}

/** A bench's references by their hashes, as they are among the originals. */
function benchOf({ standards, given, references }: RecipeBench, all: readonly Read[]) {
  const byKind: BenchReferences = {};
  const readAs: ReadAs = {};
  for (const [kind, sha256] of Object.entries(references) as [keyof BenchReferences, string][]) {
    const found = all.find(({ row }) => row.role === kind && row.sha256 === sha256);
    if (!found) continue;
    byKind[kind] = found.points;
    readAs[kind] = readAsOf(found.reading);
  }
  const bench: BenchForCorrection = { references: byKind, standards, given };
  return { bench, readAs };
}

const GATE_SHARE = 0.01;
