import { redirect } from "react-router";
import type { ProjectAccess } from "~/auth/require.server";
import { type FrequencyScaleKind, frequencyScale } from "~/charts/axis";
import { buildDifferenceScene } from "~/charts/difference-scene";
import { buildOverlayScene } from "~/charts/overlay-scene";
import * as compare from "~/db/compare.server";
import * as projects from "~/db/projects.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { decimate } from "~/measurement/decimate";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { planeWords } from "~/routes/sweeps/correction-words";
import {
  bandsOf,
  type ComparedSweep,
  chooseSweeps,
  differencesFrom,
  rowsOf,
} from "~/services/compare.server";
import { pickPoints } from "~/services/points.server";
import {
  type CompareView,
  compareSearch,
  countLeftOut,
  MOST_COMPARED,
  parseCompare,
  sweepInAddress,
} from "./compare.schema";
import { shapeRow } from "./compare-rows";
import { differencesInKind, LETTERS } from "./compare-words";

/** All that the page shows. A sweep whose address was pasted goes into the page's own address first. */
export async function loadComparePage(access: ProjectAccess, search: URLSearchParams) {
  const view = parseCompare(search);
  const pasted = search.get("add")?.trim() ?? "";
  const added = pasted ? sweepInAddress(pasted) : null;
  if (added && view.sweeps.length < MOST_COMPARED) {
    throw redirect(compareSearch(view, { sweeps: [...new Set([...view.sweeps, added])] }));
  }
  return {
    ...(await loadComparison(access, view)),
    view,
    leftOut: countLeftOut(search) + (added ? 1 : 0),
    noAddress: pasted && !added ? pasted.slice(0, 200) : null,
  };
}
export type ComparePageData = Awaited<ReturnType<typeof loadComparePage>>;
export type ShownComparison = NonNullable<ComparePageData["shown"]>;
export type ShownSweep = ReturnType<typeof shownOf>;

async function loadComparison({ project, person }: ProjectAccess, view: CompareView) {
  const [{ compared, unread, missing }, designBands, choices] = await Promise.all([
    chooseSweeps(view.sweeps, person?.id ?? null),
    projects.findDesignBands(project.id),
    compare.findChoices(project.id, view.words),
  ]);
  const at = compared.findIndex(({ sweep }) => sweep.publicId === view.reference);
  const reference = Math.max(0, at);
  const sweeps = compared.map((one, i) => shownOf(one, i, project.publicId));
  const named = {
    project: { publicId: project.publicId, title: project.title },
    sweeps,
    reference: sweeps[reference]?.publicId ?? null,
    missing: missing.length,
    unread: unread.map((one) => ({
      publicId: one.sweep.publicId,
      title: one.sweep.title,
      project: one.project.publicId,
    })),
    choices: choices.filter(({ publicId }) => !view.sweeps.includes(publicId)),
    full: view.sweeps.length >= MOST_COMPARED,
  };
  if (compared.length === 0) return { ...named, shown: null };
  const whole = wholeOf(compared);
  const range = rangeOf(view, whole);
  const scale = view.scale ?? usualScale(whole);
  const limit = view.swrLimit ?? DEFAULT_SETTINGS.swrLimit;
  const region = project.ituRegion;
  const rows = rowsOf(compared, reference);
  return {
    ...named,
    shown: {
      whole,
      range,
      scale,
      limit,
      region,
      remarks: differencesInKind(compared),
      overlay: overlayOf(compared, sweeps, rows, {
        view: { quantity: view.quantity, scale, ...range },
        bands: bandsOverlapping(region as ItuRegion | null, range.fromHz, range.toHz),
        designBands: designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
      }),
      difference: differenceShown(
        compared,
        sweeps,
        reference,
        frequencyScale(scale, range.fromHz, range.toHz),
      ),
      rows: rows.map((row) => shapeRow(row, compared, reference)),
      bands: bandsOf(compared, region, designBands, limit),
    },
  };
}

function shownOf({ sweep, project, at, analysis, reading, dips }: ComparedSweep, i: number, here: string) {
  const { frequencyHz } = at.sweep;
  return {
    letter: LETTERS[i],
    publicId: sweep.publicId,
    title: sweep.title,
    project: { publicId: project.publicId, title: project.title, here: project.publicId === here },
    takenAt: sweep.takenAt,
    createdAt: sweep.createdAt,
    pointCount: frequencyHz.length,
    startHz: frequencyHz[0],
    stopHz: frequencyHz[frequencyHz.length - 1],
    format: reading?.reading?.format ?? null,
    plane: planeWords(analysis?.correction ?? null),
    bench: analysis?.correction?.bench?.name ?? null,
    edgeDips: dips.filter(({ edge }) => edge).length,
  };
}

function overlayOf(
  compared: ComparedSweep[],
  sweeps: ShownSweep[],
  rows: ReturnType<typeof rowsOf>,
  input: Pick<Parameters<typeof buildOverlayScene>[0], "view" | "bands" | "designBands">,
) {
  return buildOverlayScene({
    ...input,
    traces: compared.map(({ at, sweep }, i) => ({
      id: sweep.publicId,
      label: `${sweeps[i].letter}: ${sweep.title}`,
      short: sweeps[i].letter,
      points: pickPoints(at.sweep, decimate(at.sweep, CHART_POINTS, input.view)),
    })),
    links: rows.map(({ cells }, i) => ({
      id: `row-${i}`,
      stops: cells.flatMap(({ dip }, j) =>
        dip
          ? [
              {
                traceId: compared[j].sweep.publicId,
                frequencyHz: dip.frequencyHz,
                returnLossDb: dip.returnLossDb,
              },
            ]
          : [],
      ),
    })),
    plotHeightPx: compared.length > FEW ? 360 : 300,
  });
}

/** Null with one sweep; `apart` are those that have no frequency in common with the reference. */
function differenceShown(
  compared: ComparedSweep[],
  sweeps: ShownSweep[],
  reference: number,
  scale: ReturnType<typeof frequencyScale>,
) {
  if (compared.length < 2) return null;
  const all = differencesFrom(compared, reference);
  const lines = all.flatMap((own, i) =>
    own && own.frequencyHz.length > 1
      ? [
          {
            id: compared[i].sweep.publicId,
            label: `${sweeps[i].letter} less ${sweeps[reference].letter}: ${compared[i].sweep.title}`,
            short: `${sweeps[i].letter} − ${sweeps[reference].letter}`,
            style: i,
            ...own,
          },
        ]
      : [],
  );
  return {
    scene: lines.length > 0 ? buildDifferenceScene(lines, scale) : null,
    apart: all.flatMap((own, i) => (own && own.frequencyHz.length <= 1 ? [sweeps[i].letter] : [])),
  };
}

function wholeOf(compared: ComparedSweep[]) {
  const grids = compared.map(({ at }) => at.sweep.frequencyHz);
  return {
    fromHz: Math.min(...grids.map((hz) => hz[0])),
    toHz: Math.max(...grids.map((hz) => hz[hz.length - 1])),
  };
}

function rangeOf(view: CompareView, whole: { fromHz: number; toHz: number }) {
  const fromHz = Math.max(whole.fromHz, view.fromHz ?? whole.fromHz);
  const toHz = Math.min(whole.toHz, view.toHz ?? whole.toHz);
  return fromHz < toHz ? { fromHz, toHz } : whole;
}

function usualScale({ fromHz, toHz }: { fromHz: number; toHz: number }): FrequencyScaleKind {
  return fromHz > 0 && toHz / fromHz > LOG_FROM_RATIO ? "log" : "linear";
}

const CHART_POINTS = 1600;
/** More lines than these get a taller plot. */
const FEW = 4;
/** Two octaves on a linear axis squeeze the lower one (common practice, no source). */
const LOG_FROM_RATIO = 4;
