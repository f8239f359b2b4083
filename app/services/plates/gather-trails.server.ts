import type { DesignBand, Project } from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import * as story from "~/db/story.server";
import * as trails from "~/db/trails.server";
import { dipRows } from "~/measurement/dip-rows";
import { formatFrequency } from "~/measurement/units";
import { formatDate } from "../dates.ts";
import type { MaterialSweep } from "./material.ts";
import type { PlateFigure } from "./record.ts";

type OfProject = Pick<Project, "id" | "publicId">;
type Trail = PlateFigure["trails"][number];
type Stop = { dip: story.StripDip; sweep: story.StripRow };

/** One trail with the sweeps that show it, oldest first; undefined where it is not of this project or shows nowhere. */
export async function trailOf(project: OfProject, publicId: string, designBands: readonly DesignBand[]) {
  const all = await waysOf(project);
  const found = all.ways.find(({ row }) => row.publicId === publicId);
  if (!found || found.stops.length === 0) return undefined;
  const trail = placed(found, designBands);
  return {
    trail,
    sweeps: found.stops.map(({ sweep }) => sweep.publicId),
    title: `The trail ${found.row.name ? `“${found.row.name}”` : `at ${trail.label}`}`,
  };
}

/** The strip map: its sweeps oldest first, every trail that two of them show, and the steps that were done between them. */
export async function stripOf(project: OfProject, designBands: readonly DesignBand[]) {
  const [{ strips, ways }, stepRows] = await Promise.all([
    waysOf(project),
    steps.findAllByProject(project.id),
  ]);
  const done = stepRows.flatMap(({ step }) => {
    if (step.state !== "done") return [];
    const at = step.at ?? step.createdAt;
    const before =
      strips.find(({ id }) => id === step.afterSweepId) ??
      strips.find(({ takenAt, createdAt }) => (takenAt ?? createdAt) > at);
    if (!before) return [];
    const caption = step.at ? formatDate(step.at) : "";
    return [{ id: step.publicId, label: step.title, caption, before: before.publicId }];
  });
  return {
    sweeps: strips.map(({ publicId }) => publicId),
    trails: ways.filter(({ stops }) => stops.length > 1).map((way) => placed(way, designBands)),
    steps: done,
  };
}

/** Dips of several sweeps that are one and the same, as they stand side by side in a comparison. */
export async function compareTrails(
  project: OfProject,
  all: readonly { material: MaterialSweep }[],
): Promise<Trail[]> {
  const { ways } = await waysOf(project);
  const trailOfDip = new Map(
    ways.flatMap(({ row, stops }) => stops.map(({ dip }) => [dip.publicId, row.publicId] as const)),
  );
  const rows = dipRows(
    all.map(({ material }) => ({
      project: project.publicId,
      dips: material.dips
        .filter(({ edge }) => !edge)
        .map((dip) => ({
          ...dip,
          trail: trailOfDip.get(dip.id) ?? null,
          widthHz: dip.bandwidth && !dip.bandwidth.open ? dip.bandwidth.widthHz : null,
        })),
    })),
  );
  return rows.map((row, i): Trail => {
    const there = row.flatMap((dip, j) => (dip ? [{ trace: all[j].material.id, dip }] : []));
    const name = ways.find(({ row: { publicId } }) => publicId === there[0].dip.trail)?.row.name;
    const { frequencyHz, frequencyUncertaintyHz } = there[0].dip;
    return {
      id: `row-${i + 1}`,
      label: name || formatFrequency(frequencyHz, frequencyUncertaintyHz),
      tone: "heather",
      stops: there.map(({ trace, dip }) => ({ trace, dip: dip.id })),
    };
  });
}

async function waysOf(project: OfProject) {
  const [strips, rows, members] = await Promise.all([
    story.findStrips(project.id),
    trails.findAllByProject(project.id),
    trails.findMembers(project.id),
  ]);
  const found = await story.findDips(strips.map(({ id }) => id));
  const dipOf = new Map(found.map((dip) => [dip.id, dip]));
  const sweepOf = new Map(strips.map((strip, index) => [strip.id, { strip, index }]));
  const byTrail = new Map<number, (Stop & { index: number })[]>();
  for (const { dipId, trailId } of members) {
    const dip = dipOf.get(dipId);
    const place = dip && sweepOf.get(dip.sweepId);
    if (!dip || !place) continue;
    const own = byTrail.get(trailId) ?? [];
    byTrail.set(trailId, [...own, { dip, sweep: place.strip, index: place.index }]);
  }
  const ways = rows.map((row) => ({
    row,
    stops: (byTrail.get(row.id) ?? []).sort((a, b) => a.index - b.index),
  }));
  return { strips, ways };
}

function placed(
  { row, stops }: { row: trails.TrailRow; stops: Stop[] },
  designBands: readonly DesignBand[],
): Trail {
  const newest = stops[stops.length - 1].dip;
  const inside = designBands.some(
    ({ lowHz, highHz }) => lowHz <= newest.frequencyHz && newest.frequencyHz <= highHz,
  );
  return {
    id: row.publicId,
    label: row.name || formatFrequency(newest.frequencyHz, newest.frequencyUncertaintyHz),
    tone: inside || designBands.length === 0 ? "heather" : row.verdict === "settled" ? "moss" : "clay",
    stops: stops.map(({ dip, sweep }) => ({ trace: sweep.publicId, dip: dip.publicId })),
  };
}
