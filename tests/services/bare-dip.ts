import { inTransaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import * as files from "~/db/files.server";
import { newPublicId } from "~/db/ids.server";
import * as sweeps from "~/db/sweeps.server";
import type { Dip } from "~/measurement/sweep";

/** A dip of a sweep that was never read, for what hangs on dips. */
export async function addBareDip(projectId: number): Promise<dips.DipRow> {
  const publicId = newPublicId();
  const file = { name: "a.csv", sizeBytes: 1, sha256: "0".repeat(64), storageKey: "none", uploadedBy: null };
  await inTransaction(async (tx) => {
    const fileId = await files.insert({ projectId, ...file }, tx);
    const sweep = await sweeps.insert({ projectId, fileId, title: "a", takenAt: null, createdBy: null }, tx);
    await dips.insertAll([{ projectId, sweepId: sweep.id, publicId, numbers: NUMBERS }], tx);
  });
  const found = await dips.findByPublicId(publicId);
  if (!found) throw new Error("The dip is not there.");
  return found.dip;
}

/** Invented numbers: what they are does not matter here. */
const NUMBERS: Dip = {
  frequencyHz: 52e6,
  frequencyUncertaintyHz: null,
  minimumSwr: 1.2,
  minimumSwrLow: null,
  minimumSwrHigh: null,
  minimumSwrNoiseLow: null,
  minimumSwrNoiseHigh: null,
  returnLossDb: 20.8,
  returnLossLowDb: null,
  returnLossHighDb: null,
  benchFrequencyHalfHz: null,
  prominenceDb: 15,
  bandwidth: null,
  q: null,
  qLow: null,
  qHigh: null,
  qLimits: null,
  shares: [],
  unknown: [],
  method: "sample",
  edge: false,
  sampleIndex: 3,
  advice: null,
};
