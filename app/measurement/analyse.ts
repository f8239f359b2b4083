import { credibleDips } from "./dips/credible.ts";
import { describeDip, type Neighbours } from "./dips/describe.ts";
import { findDips } from "./dips/find.ts";
import { noiseOf } from "./noise.ts";
import { type Analysis, type AnalysisSettings, DEFAULT_SETTINGS, type Sweep, type Warning } from "./sweep.ts";
import { warningsOf } from "./warnings.ts";

/** Raised whenever a number can come out differently. */
export const ANALYSIS_VERSION = "3";

/**
 * A sweep to its findings: noise, dips with their numbers and 95 % intervals, and what to be wary of.
 *
 * Frequencies ascending in Hz, abs Γ linear, NaN a gap. Never throws on numbers of any kind: an empty
 * sweep, one point, only gaps or a flat trace give no dips and a warning that says so. Settings that make
 * no sense (a limit of 1 or less, a negative prominence) fall back to the default. Methods: MEASUREMENT
 * sections 2 and 3, one file each under `dips/`.
 */
export function analyse(sweep: Sweep, settings: Partial<AnalysisSettings> = {}): Analysis {
  const used = sensible(settings);
  const noise = noiseOf(sweep.magnitude);
  const threshold = Math.max(used.minimumProminenceDb, NOISE_FACTOR * noise.db);
  const found = credibleDips(sweep.magnitude, findDips(sweep.magnitude, threshold), noise.gamma);
  const limit = fitLimit(found.map((dip) => dip.prominenceDb));
  const neighbours: Neighbours = { at: 0, found, stretch: null };
  const notes: Warning[] = [];
  const dips = found.map((one, at) => {
    neighbours.at = at;
    return describeDip(sweep, one, neighbours, { ...used, noise, mayFit: one.prominenceDb >= limit }, notes);
  });
  return {
    version: ANALYSIS_VERSION,
    settings: used,
    noiseDb: noise.db,
    dips,
    warnings: warningsOf(
      sweep,
      dips,
      { threshold, settings: used, noise: noise.db, unfitted: found.length > MOST_FITS },
      notes,
    ),
  };
}

function sensible(settings: Partial<AnalysisSettings>): AnalysisSettings {
  const { swrLimit, minimumProminenceDb } = { ...DEFAULT_SETTINGS, ...settings };
  return {
    swrLimit: swrLimit > 1 && Number.isFinite(swrLimit) ? swrLimit : DEFAULT_SETTINGS.swrLimit,
    minimumProminenceDb:
      minimumProminenceDb >= 0 && Number.isFinite(minimumProminenceDb)
        ? minimumProminenceDb
        : DEFAULT_SETTINGS.minimumProminenceDb,
  };
}

/** The prominence from which dips are fitted, so that at most MOST_FITS are. */
function fitLimit(prominences: number[]): number {
  if (prominences.length <= MOST_FITS) return 0;
  return prominences.sort((a, b) => b - a)[MOST_FITS - 1];
}

/** MEASUREMENT section 2: 6 σ. */
const NOISE_FACTOR = 6;
/**
 * Antennas show a handful, a feedline's ripple a few dozen; more is no antenna, and each fit costs a tenth
 * of a millisecond.
 */
const MOST_FITS = 300;
