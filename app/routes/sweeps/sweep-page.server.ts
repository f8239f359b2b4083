import type { ProjectAccess } from "~/auth/require.server";
import { type BesidePoints, packPoints } from "~/charts/sent-points";
import * as benchReferences from "~/db/bench-references.server";
import * as dips from "~/db/dips.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import type { FoundSweep } from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { decimate } from "~/measurement/decimate";
import type { AnalysisSettings, Sweep } from "~/measurement/sweep";
import { lineInPicture, placeInPicture } from "~/readers/screenshot/in-picture";
import { flatPlot } from "~/readers/screenshot/rectify";
import { targetGround } from "~/services/bands.server";
import { listThread } from "~/services/note-thread.server";
import { decodePoints, pickPoints } from "~/services/points.server";
import { storedDips, triedDips } from "~/services/shown-dips.server";
import { limitsOf, type SweepAt, sweepAt, uncorrected } from "~/services/shown-sweep.server";
import { drawBands } from "./bands-page.server";
import { loadComplex } from "./complex-page.server";
import { loadCorrection } from "./correction-page.server";
import { identityOf } from "./sweep-identity";
import type { SweepView } from "./sweeps.schema";

/** All that the page of a sweep with an analysis shows. */
export async function loadSweepPage(
  access: ProjectAccess,
  found: FoundSweep,
  analysis: NonNullable<FoundSweep["analysis"]>,
  view: SweepView,
) {
  const { settings, version, number } = analysis;
  return {
    ...identityOf(access, found),
    analysis: { settings, version, number },
    view,
    ...(await loadFindings(access, found, view, settings)),
  };
}
export type SweepPageData = Awaited<ReturnType<typeof loadSweepPage>>;

/** What is drawn and found: one round of queries, all at once. */
async function loadFindings(
  access: ProjectAccess,
  found: FoundSweep,
  view: SweepView,
  settings: AnalysisSettings,
) {
  const { project, person } = access;
  const { sweep } = found;
  const stored = found.analysis?.correction ?? null;
  const plane = view.plane === (stored?.plane ?? "instrument") ? null : view.plane;
  const asked = sweepAt(found, plane);
  const [known, designBands, at, ground, correction, dismissed, thread, sweepThread, referenceOf] =
    await Promise.all([
      dips.findAllBySweep(sweep.id),
      projects.findDesignBands(project.id),
      asked,
      targetGround(sweep),
      loadCorrection(access, found, plane, asked),
      person ? people.findDismissals(person.id) : [],
      view.dip ? threadOf(view.dip, access, sweep.id) : null,
      listThread({ projectId: project.id, sweepId: sweep.id, dipId: null }, access),
      sweep.purpose === "reference" ? benchReferences.findBenchesOf(sweep.id) : [],
    ]);
  const tried = triedSettings(view, settings) ?? (plane ? settings : null);
  const zoomed = view.fromHz !== null || view.toHz !== null;
  // As it came in, the whole of it is drawn from what is kept for that.
  const drawnAt = tried || zoomed || stored ? at : null;
  const analysis = tried && at ? analyse(at.sweep, tried) : null;
  const range = rangeOf(view, found);
  const shown = drawnAt ? drawnOf(drawnAt, range) : { sweep: previewOf(found), beside: NOTHING_BESIDE };
  const measured = drawnAt ? zoomPoints(drawnAt.measured, range) : shown.sweep;
  const shownDips = analysis ? triedDips(analysis.dips, known, designBands) : storedDips(known, designBands);
  return {
    correction: { ...correction, grey: shown.beside.measured !== undefined },
    dips: shownDips,
    // Slopes and noise need every point.
    complex: at && (drawnAt || sweep.complex) ? loadComplex(at.sweep, shownDips, view.match, range) : null,
    lostDips: known.filter((listed) => !listed.dip.present).map(lostDip),
    warnings: analysis ? [...(at?.warnings ?? []), ...analysis.warnings] : (found.analysis?.warnings ?? []),
    noiseDb: analysis?.noiseDb ?? found.analysis?.noiseDb ?? null,
    tried: tried !== null,
    range,
    points: packPoints(shown.sweep, shown.beside),
    picture: besideOf(found, measured, range),
    designBands: designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
    bands: bandsOverlapping((project.ituRegion as ItuRegion | null) ?? null, range.fromHz, range.toHz),
    dismissed,
    thread,
    sweepThread,
    referenceOf: referenceOf
      .filter(({ bench }) => bench.projectId === project.id)
      .map(({ bench, version, kind }) => ({
        bench: { publicId: bench.publicId, name: bench.name },
        version: { publicId: version.publicId, number: version.number },
        kind,
      })),
    inBands: drawBands(access, {
      at,
      designBands,
      ground,
      dips: shownDips,
      limit: view.swrLimit ?? settings.swrLimit,
    }),
  };
}

/** The chosen dip with its verdict and its thread; null where it is not a dip of this sweep. */
async function threadOf(publicId: string, access: ProjectAccess, sweepId: number) {
  const found = await dips.findByPublicId(publicId);
  if (found?.dip.sweepId !== sweepId) return null;
  return {
    publicId: found.dip.publicId,
    verdict: found.dip.verdict,
    verdictText: found.dip.verdictText,
    verdictBy: found.verdictBy,
    notes: await listThread({ projectId: access.project.id, sweepId, dipId: found.dip.id }, access),
  };
}

/** The settings of the address where they differ from the stored ones. */
function triedSettings(view: SweepView, stored: AnalysisSettings): AnalysisSettings | null {
  const swrLimit = view.swrLimit ?? stored.swrLimit;
  const minimumProminenceDb = view.minimumProminenceDb ?? stored.minimumProminenceDb;
  const same = swrLimit === stored.swrLimit && minimumProminenceDb === stored.minimumProminenceDb;
  return same ? null : { swrLimit, minimumProminenceDb };
}

/** The stretch that is drawn: the asked one inside the sweep, or all of it when nothing of it would be left. */
function rangeOf(view: SweepView, { sweep }: FoundSweep): { fromHz: number; toHz: number } {
  const startHz = sweep.startHz ?? 0;
  const stopHz = sweep.stopHz ?? 0;
  const fromHz = Math.max(startHz, view.fromHz ?? startHz);
  const toHz = Math.min(stopHz, view.toHz ?? stopHz);
  return fromHz < toHz ? { fromHz, toHz } : { fromHz: startHz, toHz: stopHz };
}

function previewOf({ sweep }: FoundSweep): Sweep | null {
  return sweep.preview ? decodePoints([sweep.preview]) : null;
}

/** The stretch in view with its limits and, in grey, what lies outside the correction. */
function drawnOf(
  at: SweepAt,
  range: { fromHz: number; toHz: number },
): { sweep: Sweep; beside: BesidePoints } {
  const { sweep, measured } = at;
  const outside = uncorrected(at);
  const limits = limitsOf(sweep);
  // Chosen by what is drawn at each point, so that the grey line keeps its dips too.
  const drawn = outside
    ? {
        ...sweep,
        magnitude: sweep.magnitude.map((value, i) => (Number.isNaN(value) ? measured.magnitude[i] : value)),
      }
    : sweep;
  const kept = decimate(drawn, CHART_POINTS, range);
  const pick = (values: Float64Array) => Float64Array.from(kept, (i) => values[i]);
  return {
    sweep: pickPoints(sweep, kept),
    beside: {
      limits: limits && { low: pick(limits.low), high: pick(limits.high) },
      measured: outside && pick(outside),
    },
  };
}

function zoomPoints(full: Sweep, range: { fromHz: number; toHz: number }): Sweep {
  return pickPoints(full, decimate(full, CHART_POINTS, range));
}

/** The picture as it stands beside the curve: what of it lies over the stretch in view; null for files of numbers. */
function besideOf({ reading }: FoundSweep, points: Sweep | null, range: { fromHz: number; toHz: number }) {
  const spec = reading?.reading?.spec.screenshot;
  const place = spec ? placeInPicture(spec) : null;
  const size = spec?.corners ? flatPlot(spec.corners) : reading?.reading?.picture;
  if (!spec || !place || !size) return null;
  const { width, height } = size;
  return {
    flat: spec.corners !== undefined,
    width,
    height,
    frame: place.frame,
    fromX: place.columnOf(range.fromHz),
    toX: place.columnOf(range.toHz),
    scale: spec.scale ?? "linear",
    unit: spec.quantity === "swr" ? "SWR" : "dB",
    halfColumnHz: place.halfColumnHz,
    halfRow: place.halfRow,
    line: points ? lineInPicture(points, place) : [],
  };
}

function lostDip({ dip, noteCount }: dips.ListedDip) {
  return { publicId: dip.publicId, frequencyHz: dip.frequencyHz, noteCount, verdict: dip.verdict };
}

const NOTHING_BESIDE: BesidePoints = {};
const CHART_POINTS = 1600;
