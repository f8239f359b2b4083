import * as sweeps from "~/db/sweeps.server";
import { decimate } from "~/measurement/decimate";
import type { Sweep } from "~/measurement/sweep";
import type { FileFormat } from "~/readers/reading";
import { decodePoints, pickPoints } from "./points.server.ts";

/** A sweep in a list: what it is, its dips, and its profile small enough to be sent with the page. */
export interface SweepSummary {
  publicId: string;
  title: string;
  fileName: string;
  format: FileFormat | null;
  by: string | null;
  takenAt: Date | null;
  createdAt: Date;
  unread: boolean;
  pointCount: number | null;
  startHz: number | null;
  stopHz: number | null;
  noteCount: number;
  openDips: number;
  dips: { publicId: string; frequencyHz: number; minimumSwr: number | null; verdict: string }[];
  profile: SmallProfile | null;
}

/** What a small drawing needs: hertz and abs Γ, dips kept, rounded to what can be seen; NaN is a gap. */
export interface SmallProfile {
  points: { frequencyHz: number[]; magnitude: number[] };
  dips: { frequencyHz: number; returnLossDb: number }[];
}

export async function listSweeps(projectId: number, page: { limit?: number; cursor?: string } = {}) {
  const found = await sweeps.findAllByProject(projectId, page);
  const dips = await sweeps.findDipsOf(found.rows.map((row) => row.id));
  const rows = found.rows.map((row): SweepSummary => {
    const own = dips.filter((dip) => dip.sweepId === row.id);
    return {
      publicId: row.publicId,
      title: row.title,
      fileName: row.fileName,
      format: row.reading?.format ?? null,
      by: row.by,
      takenAt: row.takenAt,
      createdAt: row.createdAt,
      unread: row.problem !== null,
      pointCount: row.pointCount,
      startHz: row.startHz,
      stopHz: row.stopHz,
      noteCount: row.noteCount,
      openDips: own.filter((dip) => dip.verdict !== "settled").length,
      dips: own.map(({ publicId, frequencyHz, minimumSwr, verdict }) => ({
        publicId,
        frequencyHz,
        minimumSwr,
        verdict,
      })),
      profile: row.preview ? smallProfile(decodePoints([row.preview]), own) : null,
    };
  });
  return { rows, nextCursor: found.nextCursor };
}

/** At most `mostPoints` points, dips kept, closest where the axis (logarithmic unless said otherwise) is widest. */
export function smallProfile(
  sweep: Sweep,
  dips: { frequencyHz: number; returnLossDb: number }[],
  { mostPoints = MOST_POINTS, log = true } = {},
): SmallProfile {
  const { frequencyHz, magnitude } = pickPoints(sweep, decimate(sweep, mostPoints, undefined, log));
  return {
    points: {
      frequencyHz: Array.from(frequencyHz, (hz) => Number(hz.toPrecision(6))),
      magnitude: Array.from(magnitude, (value) => Number(value.toPrecision(4))),
    },
    dips: dips.map((dip) => ({ frequencyHz: dip.frequencyHz, returnLossDb: dip.returnLossDb })),
  };
}

const MOST_POINTS = 360;
