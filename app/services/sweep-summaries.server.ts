import * as sweeps from "~/db/sweeps.server";
import type { FileFormat } from "~/readers/reading";
import { decodePoints } from "./points.server.ts";

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

/** Points of a small drawing: hertz and dB of return loss, dips kept, rounded to what can be seen. */
export interface SmallProfile {
  frequencyHz: number[];
  returnLossDb: (number | null)[];
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
      profile: row.preview ? smallProfile(row.preview, own) : null,
    };
  });
  return { rows, nextCursor: found.nextCursor };
}

/** At most `MOST_POINTS` points: in each stretch the highest and the lowest, so that no dip is lost. */
function smallProfile(preview: Buffer, dips: { frequencyHz: number; returnLossDb: number }[]): SmallProfile {
  const { frequencyHz, magnitude } = decodePoints([preview]);
  const step = Math.max(1, Math.ceil((2 * frequencyHz.length) / MOST_POINTS));
  const kept: number[] = [];
  for (let start = 0; start < frequencyHz.length; start += step) {
    let low = start;
    let high = start;
    for (let i = start; i < Math.min(start + step, frequencyHz.length); i++) {
      if (magnitude[i] < magnitude[low] || Number.isNaN(magnitude[low])) low = i;
      if (magnitude[i] > magnitude[high] || Number.isNaN(magnitude[high])) high = i;
    }
    if (low === high) kept.push(low);
    else kept.push(Math.min(low, high), Math.max(low, high));
  }
  return {
    frequencyHz: kept.map((i) => Number(frequencyHz[i].toPrecision(6))),
    returnLossDb: kept.map((i) =>
      Number.isNaN(magnitude[i]) ? null : Number(Math.min(60, -20 * Math.log10(magnitude[i])).toFixed(2)),
    ),
    dips: dips.map((dip) => ({ frequencyHz: dip.frequencyHz, returnLossDb: dip.returnLossDb })),
  };
}

const MOST_POINTS = 240;
