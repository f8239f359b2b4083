import type { ProjectAccess } from "~/auth/require.server";
import * as dips from "~/db/dips.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { notFound } from "~/errors";
import { bandAt, bandSources, bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { decimate } from "~/measurement/decimate";
import type { Dip, Sweep } from "~/measurement/sweep";
import { closeUpRange } from "~/services/close-up";
import { listThread } from "~/services/note-thread.server";
import { storedDips } from "~/services/shown-dips.server";
import { limitsOf, sweepAt } from "~/services/shown-sweep.server";
import { loadTrailOfDip } from "../trails/trail-of-dip.server.ts";
import { loadJudgement } from "./judgement.server.ts";

/** Everything about one dip of this project, or 404. */
export async function loadDipPage(access: ProjectAccess, publicId: string) {
  const [page, judgement] = await Promise.all([loadDip(access, publicId), loadJudgement(access, publicId)]);
  return {
    projectId: access.project.publicId,
    mayWrite: access.may("note.write"),
    mayVerdict: { propose: access.may("verdict.propose"), settle: access.may("verdict.settle") },
    ...page,
    judgement,
  };
}
export type DipPageData = Awaited<ReturnType<typeof loadDipPage>>;

/** What was measured, where, and what was said on it. */
async function loadDip(access: ProjectAccess, publicId: string) {
  const { project, person } = access;
  const found = await dips.findByPublicId(publicId);
  if (!found || found.dip.projectId !== project.id) throw notFound("dip");
  const { dip } = found;
  const [from, known, designBands, dismissed, thread, trail] = await Promise.all([
    sweeps.findByPublicId(found.sweep.publicId),
    dips.findAllBySweep(dip.sweepId),
    projects.findDesignBands(project.id),
    person ? people.findDismissals(person.id) : ([] as string[]),
    listThread({ projectId: project.id, sweepId: dip.sweepId, dipId: dip.id }, access),
    loadTrailOfDip(access, dip),
  ]);
  if (!from) throw notFound("sweep");
  const at = await sweepAt(from);
  const points = at?.sweep ?? null;
  const range = closeUpRange(dip.numbers, points);
  const region = (project.ituRegion as ItuRegion | null) ?? null;
  return {
    dip: {
      publicId: dip.publicId,
      present: dip.present,
      numbers: dip.numbers,
      verdict: dip.verdict,
      verdictText: dip.verdictText,
      verdictBy: found.verdictBy,
      verdictAt: dip.verdictAt,
    },
    trail,
    sweep: { publicId: from.sweep.publicId, title: from.sweep.title, takenAt: from.sweep.takenAt },
    provenance: provenanceOf(from),
    benchId: from.analysis?.correction?.bench?.bench ?? null,
    closeUp: { range, points: closeUpPoints(points, range), stepHz: stepAround(dip.numbers, points) },
    shown: storedDips(known, designBands),
    neighbours: neighboursOf(dip, known),
    designBands: designBands.map(({ name, lowHz, highHz, swrLimit }) => ({ name, lowHz, highHz, swrLimit })),
    bands: bandsOverlapping(region, range.fromHz, range.toHz),
    allocation: bandAt(region, dip.frequencyHz),
    region,
    bandSources: bandSources(region),
    dismissed,
    thread,
  };
}

function provenanceOf({ file, reading, analysis, sweep, by }: sweeps.FoundSweep) {
  return {
    fileName: file.name,
    sha256: file.sha256,
    by,
    format: reading?.reading?.format ?? null,
    quantity: reading?.reading?.quantity ?? null,
    readingNumber: reading?.number ?? null,
    assumed: reading?.reading?.assumed ?? [],
    analysisNumber: analysis?.number ?? null,
    analysisVersion: analysis?.version ?? null,
    analysedAt: analysis?.createdAt ?? null,
    settings: analysis?.settings ?? null,
    correction: analysis?.correction ?? null,
    noiseDb: analysis?.noiseDb ?? null,
    pointCount: sweep.pointCount,
    startHz: sweep.startHz,
    stopHz: sweep.stopHz,
    referenceOhm: sweep.referenceOhm,
    complex: sweep.complex ?? false,
  };
}

/** The dips left and right of this one in the same sweep, by frequency. */
function neighboursOf(dip: dips.DipRow, known: dips.ListedDip[]) {
  const others = known.map((listed) => listed.dip).filter((other) => other.present && other.id !== dip.id);
  const below = others.filter((other) => other.frequencyHz < dip.frequencyHz).at(-1);
  const above = others.find((other) => other.frequencyHz >= dip.frequencyHz);
  const brief = (other: dips.DipRow | undefined) =>
    other
      ? {
          publicId: other.publicId,
          frequencyHz: other.frequencyHz,
          frequencyUncertaintyHz: other.numbers.frequencyUncertaintyHz,
        }
      : null;
  return { previous: brief(below), next: brief(above) };
}

/** Rounded to what a drawing can show; NaN is a gap. */
function closeUpPoints(points: Sweep | null, range: { fromHz: number; toHz: number }) {
  if (!points || !(range.fromHz < range.toHz)) return { frequencyHz: [], magnitude: [], limits: undefined };
  const kept = decimate(points, CLOSE_UP_POINTS, range);
  const limits = limitsOf(points);
  const pick = (values: Float64Array, digits: number) =>
    Array.from(kept, (i) => Number(values[i].toPrecision(digits)));
  return {
    frequencyHz: pick(points.frequencyHz, 9),
    magnitude: pick(points.magnitude, 5),
    limits: limits && { low: pick(limits.low, 5), high: pick(limits.high, 5) },
  };
}

/** The frequency step at the dip; null where there is none. */
function stepAround({ sampleIndex: i }: Dip, points: Sweep | null): number | null {
  const hz = points?.frequencyHz;
  if (!hz || hz.length < 2 || i >= hz.length) return null;
  return i > 0 ? hz[i] - hz[i - 1] : hz[1] - hz[0];
}

const CLOSE_UP_POINTS = 800;
