import type { ListedDip } from "~/db/dips.server";
import type { DesignBand } from "~/db/projects.server";
import { pairDips } from "~/measurement/match-dips";
import type { Dip } from "~/measurement/sweep";
import { plainText } from "./markdown.server.ts";

/** A dip as pages show it: its numbers with its thread and verdict. */
export interface ShownDip extends Dip {
  /** Null for a dip that only the tried settings find. */
  publicId: string | null;
  noteCount: number;
  latestNote: string | null;
  verdict: "open" | "proposed" | "settled";
  verdictText: string;
  /** Null while the project has no design bands. */
  inDesignBand: boolean | null;
}

/** The dips of the stored analysis. */
export function storedDips(known: ListedDip[], bands: DesignBand[]): ShownDip[] {
  return known.filter(({ dip }) => dip.present).map((listed) => shownOf(listed.dip.numbers, listed, bands));
}

/** The dips that other settings would find, each with the thread of the known dip that it is. */
export function triedDips(found: Dip[], known: ListedDip[], bands: DesignBand[]): ShownDip[] {
  const pairs = pairDips(
    known.map(({ dip }) => dip.frequencyHz),
    found.map((dip) => dip.frequencyHz),
    (hz) => hz * 0.01,
  );
  return found.map((dip, j) => {
    const i = pairs.indexOf(j);
    return shownOf(dip, i < 0 ? null : known[i], bands);
  });
}

function shownOf(numbers: Dip, listed: ListedDip | null, bands: DesignBand[]): ShownDip {
  return {
    ...numbers,
    publicId: listed?.dip.publicId ?? null,
    noteCount: listed?.noteCount ?? 0,
    latestNote: listed?.latestNote ? plainText(listed.latestNote, 120) : null,
    verdict: listed?.dip.verdict ?? "open",
    verdictText: listed?.dip.verdictText ?? "",
    inDesignBand:
      bands.length === 0
        ? null
        : bands.some((band) => band.lowHz <= numbers.frequencyHz && numbers.frequencyHz <= band.highHz),
  };
}
