import * as subjects from "~/db/note-subjects.server";
import { dipWords, plateWords, sweepWords } from "../note-words.ts";

/** Something of a project that can stand in a write-up as a figure. */
export interface FigureChoice {
  /** "dip:57b…" */
  subject: string;
  kind: "plate" | "dip" | "sweep";
  words: string;
}

/** Plates first, for they never change; then the newest sweeps and dips. */
export async function findChoices(projectId: number): Promise<FigureChoice[]> {
  const [plates, dips, sweeps] = await Promise.all([
    subjects.searchPlates(projectId, "", MOST),
    subjects.searchDips(projectId, "", MOST),
    subjects.searchSweeps(projectId, "", MOST),
  ]);
  return [
    ...plates
      .filter(({ withdrawnAt }) => withdrawnAt === null)
      .map((one) => ({ subject: `plate:${one.publicId}`, kind: "plate" as const, words: plateWords(one) })),
    ...dips.map((one) => ({ subject: `dip:${one.publicId}`, kind: "dip" as const, words: dipWords(one) })),
    ...sweeps.map((one) => ({
      subject: `sweep:${one.publicId}`,
      kind: "sweep" as const,
      words: sweepWords(one),
    })),
  ];
}

const MOST = 40;
