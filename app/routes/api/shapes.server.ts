import type { z } from "zod";
import type { ProjectRole } from "~/auth/permissions";
import type * as dips from "~/db/dips.server";
import type * as notes from "~/db/notes.server";
import type * as projects from "~/db/projects.server";
import type { StoredCorrection } from "~/db/schema";
import type * as sweeps from "~/db/sweeps.server";
import type { Dip } from "~/measurement/sweep";
import type * as shapes from "./schemas.ts";

/** Rows as the API shows them. */

type ProjectRow = Pick<
  projects.Project,
  "publicId" | "title" | "summary" | "visibility" | "ituRegion" | "demo" | "updatedAt"
>;

export function shapeProject(
  project: ProjectRow,
  role: ProjectRole,
  sweepCount: number,
): z.output<typeof shapes.projectShape> {
  const self = `/api/v1/projects/${project.publicId}`;
  return {
    id: project.publicId,
    title: project.title,
    summary: project.summary,
    visibility: project.visibility,
    ituRegion: project.ituRegion,
    demo: project.demo === 1,
    role,
    sweepCount,
    updatedAt: project.updatedAt.toISOString(),
    links: { self, sweeps: `${self}/sweeps`, page: `/projects/${project.publicId}` },
  };
}

interface HeadRow {
  sweep: Pick<
    sweeps.SweepRow,
    | "publicId"
    | "title"
    | "takenAt"
    | "createdAt"
    | "problem"
    | "pointCount"
    | "startHz"
    | "stopHz"
    | "referenceOhm"
    | "complex"
  >;
  fileName: string;
  fileSha256: string;
  format: "text" | "touchstone" | "screenshot" | null;
}

function shapeHead({ sweep, fileName, fileSha256, format }: HeadRow) {
  const { pointCount, startHz, stopHz, referenceOhm, complex } = sweep;
  const known =
    !sweep.problem && pointCount !== null && startHz !== null && stopHz !== null && referenceOhm !== null;
  return {
    id: sweep.publicId,
    title: sweep.title,
    file: fileName,
    sha256: fileSha256,
    format,
    takenAt: sweep.takenAt?.toISOString() ?? null,
    createdAt: sweep.createdAt.toISOString(),
    sweep: known ? { points: pointCount, startHz, stopHz, referenceOhm, complex: complex === true } : null,
    error: sweep.problem ?? null,
  };
}

type ListedSweep = Awaited<ReturnType<typeof sweeps.findAllByProject>>["rows"][number];
type ListedDip = Awaited<ReturnType<typeof sweeps.findDipsOf>>[number];

export function shapeSweepSummary(
  row: ListedSweep,
  its: ListedDip[],
  project: string,
): z.output<typeof shapes.sweepSummaryShape> {
  const { fileName, fileSha256 } = row;
  return {
    ...shapeHead({ sweep: row, fileName, fileSha256, format: row.reading?.format ?? null }),
    dips: its.map(({ publicId, frequencyHz, minimumSwr, returnLossDb, verdict }) => ({
      id: publicId,
      frequencyHz,
      minimumSwr,
      returnLossDb,
      verdict,
    })),
    links: {
      self: `/api/v1/sweeps/${row.publicId}`,
      page: `/projects/${project}/sweeps/${row.publicId}`,
    },
  };
}

export function shapeSweep(
  found: sweeps.FoundSweep,
  its: dips.ListedDip[],
  project: string,
): z.output<typeof shapes.sweepShape> {
  const { sweep, file, reading, analysis } = found;
  const read = reading?.reading ?? null;
  const present = its.filter(({ dip }) => dip.present && !sweep.problem);
  const self = `/api/v1/sweeps/${sweep.publicId}`;
  const page = `/projects/${project}/sweeps/${sweep.publicId}`;
  return {
    ...shapeHead({ sweep, fileName: file.name, fileSha256: file.sha256, format: read?.format ?? null }),
    reading: read && {
      quantity: read.quantity,
      frequencyUnit: read.frequencyUnit,
      assumed: read.assumed,
      confidence: read.confidence,
    },
    correction: shapeCorrection(sweep.problem ? null : (analysis?.correction ?? null)),
    dips: present.map((row) => shapeDip(row, project)),
    warnings: analysis && !sweep.problem ? analysis.warnings : [],
    analysis:
      analysis && !sweep.problem
        ? {
            version: analysis.version,
            settings: analysis.settings,
            number: analysis.number,
            createdAt: analysis.createdAt.toISOString(),
          }
        : null,
    links: {
      self,
      points: `${self}/points`,
      project: `/api/v1/projects/${project}`,
      page,
      original: `${page}/original`,
    },
  };
}

export function shapeCorrection(stored: StoredCorrection | null): z.output<typeof shapes.correctionShape> {
  if (!stored)
    return { kind: "none", plane: "instrument", fromHz: null, toHz: null, bench: null, feedline: null };
  const { kind, plane, fromHz, toHz, bench, feedline } = stored;
  return {
    kind,
    plane,
    fromHz,
    toHz,
    bench: bench && { id: bench.bench, name: bench.name, version: bench.number },
    feedline: feedline && {
      name: feedline.name,
      k1: feedline.k1,
      k2: feedline.k2,
      lengthM: feedline.lengthM,
      velocityFactor: feedline.velocityFactor,
    },
  };
}

interface ToldDip {
  dip: Pick<dips.ListedDip["dip"], "publicId" | "numbers" | "verdict" | "verdictText">;
  noteCount: number;
}

export function shapeDip({ dip, noteCount }: ToldDip, project: string): z.output<typeof shapes.dipShape> {
  const numbers: Dip = dip.numbers;
  return {
    id: dip.publicId,
    frequencyHz: numbers.frequencyHz,
    frequencyUncertaintyHz: numbers.frequencyUncertaintyHz,
    minimumSwr: Number.isFinite(numbers.minimumSwr) ? numbers.minimumSwr : null,
    minimumSwrLow: numbers.minimumSwrLow,
    minimumSwrHigh: numbers.minimumSwrHigh,
    minimumSwrNoiseLow: numbers.minimumSwrNoiseLow,
    minimumSwrNoiseHigh: numbers.minimumSwrNoiseHigh,
    returnLossDb: numbers.returnLossDb,
    returnLossLowDb: numbers.returnLossLowDb,
    returnLossHighDb: numbers.returnLossHighDb,
    benchFrequencyHalfHz: numbers.benchFrequencyHalfHz,
    prominenceDb: numbers.prominenceDb,
    bandwidth: numbers.bandwidth,
    q: numbers.q,
    qLow: numbers.qLow,
    qHigh: numbers.qHigh,
    qLimits: numbers.qLimits,
    limits: numbers.shares,
    unknown: numbers.unknown,
    method: numbers.method,
    edge: numbers.edge,
    verdict: dip.verdict,
    verdictText: dip.verdictText,
    noteCount,
    links: {
      notes: `/api/v1/dips/${dip.publicId}/notes`,
      causes: `/api/v1/dips/${dip.publicId}/causes`,
      page: `/projects/${project}/dips/${dip.publicId}`,
    },
  };
}

type PagedNote = Awaited<ReturnType<typeof notes.findPageByDip>>["rows"][number];

export function shapeNote({ note, author, parent }: PagedNote): z.output<typeof shapes.noteShape> {
  return {
    id: note.publicId,
    parent,
    author: author && { userName: author.userName, name: author.name },
    body: note.removedAt ? "" : note.body,
    createdAt: note.createdAt.toISOString(),
    editedAt: note.editedAt?.toISOString() ?? null,
    removed: note.removedAt !== null,
  };
}
