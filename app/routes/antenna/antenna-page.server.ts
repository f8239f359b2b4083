import * as antennas from "~/db/antennas.server";
import { NO_ANTENNA } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";
import { changesInWords } from "~/services/antenna-words";

/** The antenna of a moment, and how it came to be so. */
export async function loadAntennaPage(projectId: number, on: Date | null, unit: LengthUnit) {
  const versions = await antennas.findAllByProject(projectId);
  const until = on ?? new Date(FAR_AHEAD);
  const here = versions.findLastIndex(({ version }) => version.validFrom <= until);
  const latest = versions.length - 1;
  return {
    /** Null where the antenna is not described for that day, or not at all. */
    antenna: versions[here]?.version.content ?? null,
    validFrom: versions[here]?.version.validFrom ?? null,
    isLatest: here === latest,
    /** Until when it was so; null for the version that counts now. */
    validUntil: versions[here + 1]?.version.validFrom ?? null,
    describedFrom: versions[0]?.version.validFrom ?? null,
    history: versions
      .map(({ version, by, step }, i) => ({
        publicId: version.publicId,
        validFrom: version.validFrom,
        remark: version.remark,
        by,
        step,
        shown: i === here,
        changes: changesInWords(versions[i - 1]?.version.content ?? NO_ANTENNA, version.content, unit),
      }))
      .reverse(),
  };
}
export type AntennaPage = Awaited<ReturnType<typeof loadAntennaPage>>;

/** `2026-05-03` is the end of that day, with a time that minute; null for what is no day. */
export function parseOn(text: string | null): Date | null {
  if (!text || !/^\d{4}-\d{2}-\d{2}(T\d{2}:\d{2})?$/.test(text)) return null;
  const at = new Date(text.includes("T") ? `${text}:59.999Z` : `${text}T23:59:59.999Z`);
  return Number.isNaN(at.getTime()) ? null : at;
}

const FAR_AHEAD = "9999-01-01T00:00:00Z";
