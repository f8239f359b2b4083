import type { FrequencyScaleKind } from "~/charts/axis";
import type { ChartPoints } from "~/charts/decimate";
import { buildStripScene, type StripStep } from "~/charts/strip-scene";
import type { Project } from "~/db/projects.server";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import * as story from "~/db/story.server";
import * as trails from "~/db/trails.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { formatDate, formatDateShort } from "~/services/dates";
import { decodePoints } from "~/services/points.server";
import { loadManyPoints } from "~/services/sweep-points.server";
import { parseStripView, type StripView } from "./components/strip/strip.schema.ts";
import { stepBefore, trailsOfMap } from "./strip-trails.server.ts";

/** Everything that the strip map draws, reckoned and small. */
export async function loadStripMap(project: Project, search: URLSearchParams) {
  const view = parseStripView(search);
  const [rows, stepRows, trailRows, members, designBands] = await Promise.all([
    story.findStrips(project.id),
    steps.findAllByProject(project.id),
    trails.findAllByProject(project.id),
    trails.findMembers(project.id),
    projects.findDesignBands(project.id),
  ]);
  const dips = await story.findDips(rows.map(({ id }) => id));
  const shown = rows.filter(({ publicId }) => !view.hide.includes(publicId));
  const whole = wholeOf(shown);
  const range = rangeOf(view, whole);
  const points = await pointsOf(shown, range, whole);
  const dateOf = captionsOf(rows);
  const placedSteps: StripStep[] = stepRows.map(({ step }) => ({
    id: step.publicId,
    title: step.title,
    caption: step.at ? formatDateShort(step.at) : "",
    planned: step.state === "planned",
    before: stepBefore(step, shown),
  }));
  const scale = view.scale ?? usualScale(whole);
  const scene = buildStripScene({
    strips: shown.map((row) => ({
      id: row.publicId,
      title: row.title,
      caption: dateOf.get(row.id) ?? "",
      points: points.get(row.id) ?? NO_POINTS,
      dips: dips
        .filter((dip) => dip.sweepId === row.id)
        .map(({ publicId, frequencyHz, returnLossDb }) => ({ id: publicId, frequencyHz, returnLossDb })),
    })),
    steps: placedSteps,
    trails: trailsOfMap({ rows: shown, dips, trails: trailRows, members, designBands, steps: stepRows }),
    scale,
    ...range,
    bands: bandsOverlapping((project.ituRegion as ItuRegion | null) ?? null, range.fromHz, range.toHz),
    designBands: designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
  });
  return {
    scene,
    view: { ...view, scale },
    whole,
    sweeps: rows.map(({ id, publicId, title }) => ({ publicId, title, caption: dateOf.get(id) ?? "" })),
    more: rows.length === story.MOST_STRIPS,
  };
}

/** Lowest start and highest stop; something for a project without sweeps. */
function wholeOf(rows: readonly story.StripRow[]) {
  const starts = rows.flatMap(({ startHz }) => startHz ?? []);
  const stops = rows.flatMap(({ stopHz }) => stopHz ?? []);
  return starts.length > 0 ? { fromHz: Math.min(...starts), toHz: Math.max(...stops) } : NOWHERE;
}

function rangeOf(view: StripView, whole: { fromHz: number; toHz: number }) {
  const fromHz = Math.max(whole.fromHz, view.fromHz ?? whole.fromHz);
  const toHz = Math.min(whole.toHz, view.toHz ?? whole.toHz);
  return fromHz < toHz ? { fromHz, toHz } : whole;
}

function usualScale({ fromHz, toHz }: { fromHz: number; toHz: number }): FrequencyScaleKind {
  return fromHz > 0 && toHz / fromHz > LOG_FROM_RATIO ? "log" : "linear";
}

/** The stored previews; on a close look the points themselves, where they are drawn as they were measured. */
async function pointsOf(
  rows: readonly story.StripRow[],
  range: { fromHz: number; toHz: number },
  whole: { fromHz: number; toHz: number },
): Promise<Map<number, ChartPoints>> {
  const close = range.toHz - range.fromHz < (whole.toHz - whole.fromHz) * CLOSE_SHARE;
  const all = close
    ? rows.filter(({ asMeasured, pointCount }) => asMeasured && (pointCount ?? 0) > FEW_POINTS)
    : [];
  const total = all.reduce((sum, { pointCount }) => sum + (pointCount ?? 0), 0);
  const wanted = total <= MOST_POINTS ? all : [];
  const full = await loadManyPoints(wanted.flatMap(({ readingId }) => readingId ?? []));
  return new Map(
    rows.flatMap((row) => {
      const points = full.get(row.readingId ?? 0) ?? (row.preview ? decodePoints([row.preview]) : null);
      return points ? [[row.id, points] as const] : [];
    }),
  );
}

/** Dates without their year where all are of one year. */
function captionsOf(rows: readonly story.StripRow[]): Map<number, string> {
  const years = new Set(rows.map(({ takenAt, createdAt }) => (takenAt ?? createdAt).getUTCFullYear()));
  const format = years.size > 1 ? formatDate : formatDateShort;
  return new Map(rows.map(({ id, takenAt }) => [id, takenAt ? format(takenAt) : "no date"]));
}

const NO_POINTS: ChartPoints = { frequencyHz: [], magnitude: [] };
const NOWHERE = { fromHz: 1e6, toHz: 30e6 };
/** Two octaves on a linear axis squeeze the lower one (common practice, no source). */
const LOG_FROM_RATIO = 4;
const CLOSE_SHARE = 0.4;
/** A preview holds every point of shorter sweeps. */
const FEW_POINTS = 1600;
/** More than this is not unpacked for one page: the previews, 1600 points each, are then drawn closer. */
const MOST_POINTS = 1_500_000;
