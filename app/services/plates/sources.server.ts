import type { FoundReference } from "~/db/bench-references.server";
import type { Reading } from "~/readers/reading";
import type { LoadedBench } from "../bench-sweeps.server.ts";
import type { Gathered, GatheredSweep } from "./gather.server.ts";
import type { Recipe, RecipeBench } from "./recipe.ts";
import type { PlateSource } from "./record.ts";

/** An original that a plate will rest on. */
export interface SourceToKeep {
  source: PlateSource;
  recipe: Recipe;
  storageKey: string;
  /** Its row while the sweep is there: held while the plate is written. */
  fileId: number;
}

/** The originals behind what was gathered: each sweep's, then its bench's references, none twice. */
export function sourcesOf({ sweeps, bench }: Gathered): SourceToKeep[] {
  const kept = new Map<string, SourceToKeep>();
  const add = (one: SourceToKeep) => {
    const key = `${one.source.role} ${one.storageKey}`;
    if (!kept.has(key)) kept.set(key, one);
  };
  for (const one of sweeps) {
    add(ofSweep(one));
    for (const reference of one.at.means.bench?.references ?? []) {
      if (one.at.correction?.bench && one.at.means.bench) add(ofReference(reference, one.at.means.bench));
    }
  }
  for (const reference of bench?.references ?? []) add(ofReference(reference, bench as LoadedBench));
  return [...kept.values()];
}

function ofSweep({ found, at }: GatheredSweep): SourceToKeep {
  const { sweep, file, reading, analysis } = found;
  const { correction, means } = at;
  const bench = correction?.bench ? means.bench : null;
  const settings = analysis?.settings ?? null;
  return {
    fileId: file.id,
    storageKey: file.storageKey,
    source: {
      role: "sweep",
      sweep: sweep.publicId,
      title: sweep.title,
      takenAt: sweep.takenAt?.toISOString() ?? null,
      name: file.name,
      sha256: file.sha256,
      sizeBytes: file.sizeBytes,
      reading: readingOf(reading?.reading ?? null),
      settings,
      analysisVersion: analysis?.version ?? null,
      correction: correction && {
        kind: correction.kind,
        plane: correction.plane,
        fromHz: correction.fromHz,
        toHz: correction.toHz,
        feedline: correction.feedline,
        references: correction.references,
      },
      bench: bench && benchOf(bench),
    },
    recipe: {
      given: reading?.reading?.spec ?? {},
      analysis: settings && {
        settings,
        plane: correction?.plane ?? "instrument",
        feedline: correction?.feedline ?? null,
      },
      bench: bench && recipeBench(bench),
    },
  };
}

function ofReference(reference: FoundReference, bench: LoadedBench): SourceToKeep {
  const { kind, sweep, reading } = reference;
  return {
    fileId: reference.fileId,
    storageKey: reference.storageKey,
    source: {
      role: kind,
      sweep: sweep.publicId,
      title: sweep.title,
      takenAt: sweep.takenAt?.toISOString() ?? null,
      name: reference.fileName,
      sha256: reference.sha256,
      sizeBytes: reference.sizeBytes,
      reading: readingOf(reading),
      settings: null,
      analysisVersion: null,
      correction: null,
      bench: benchOf(bench),
    },
    recipe: { given: reading?.spec ?? {}, analysis: null, bench: recipeBench(bench) },
  };
}

function readingOf(reading: Reading | null): PlateSource["reading"] {
  if (!reading) return { format: "unknown", quantity: "unknown", assumed: [], spec: {} };
  const { format, quantity, assumed, spec } = reading;
  return { format, quantity, assumed, spec };
}

function benchOf({ bench, version }: LoadedBench): NonNullable<PlateSource["bench"]> {
  return {
    name: bench.name,
    version: version.number,
    standards: version.standards,
    given: version.given,
  };
}

function recipeBench({ version, references }: LoadedBench): RecipeBench {
  return {
    standards: version.standards,
    given: version.given,
    references: Object.fromEntries(references.map(({ kind, sha256 }) => [kind, sha256])),
  };
}
