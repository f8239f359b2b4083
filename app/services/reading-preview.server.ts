import type { AnalysisSettings } from "~/measurement/sweep";
import { formatFrequency, formatSwr } from "~/measurement/units";
import type { Given, Reading, ReadProblem } from "~/readers/reading";
import { decodePoints } from "./points.server.ts";
import { readFile } from "./reading.server.ts";
import type { SeenPicture } from "./seen-picture.ts";
import { type SmallProfile, smallProfile } from "./sweep-summaries.server.ts";

/** What a reading would give, without keeping it: the curve, the dips, what was assumed, or why not. */
export interface TriedReading {
  reading: Reading | null;
  problem: ReadProblem | null;
  points: number | null;
  span: string | null;
  profile: SmallProfile | null;
  dips: { frequency: string; swr: string }[];
  warnings: string[];
  /** Of pictures that could be opened. */
  picture: SeenPicture | null;
}

export async function tryReading(
  file: { name: string; bytes: Uint8Array },
  given: Given,
  settings: AnalysisSettings,
  /** Pictures: their SHA-256, so that their pixels are kept at hand, and whether print is read. */
  picture: { kept?: string; print?: boolean } = {},
): Promise<TriedReading> {
  const outcome = await readFile({ ...file, given, settings, ...picture });
  if (!outcome.ok) {
    return {
      reading: outcome.reading,
      problem: outcome.problem,
      points: null,
      span: null,
      profile: null,
      dips: [],
      warnings: [],
      picture: outcome.picture,
    };
  }
  const { analysis } = outcome;
  return {
    reading: outcome.reading,
    problem: null,
    points: outcome.pointCount,
    span: `${formatFrequency(outcome.startHz, null)} – ${formatFrequency(outcome.stopHz, null)}`,
    profile: smallProfile(decodePoints([Buffer.from(outcome.preview)]), analysis.dips, {
      mostPoints: PROFILE_POINTS,
      log: false,
    }),
    dips: analysis.dips.slice(0, MOST_DIPS).map((dip) => ({
      frequency: formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz),
      swr: formatSwr(dip.minimumSwr, null, null),
    })),
    warnings: analysis.warnings.map((warning) => warning.message),
    picture: outcome.picture,
  };
}

const PROFILE_POINTS = 600;
const MOST_DIPS = 12;
