import * as benches from "~/db/benches.server";
import * as dips from "~/db/dips.server";
import type { Project } from "~/db/projects.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { formatFrequency } from "~/measurement/units";
import { type LoadedBench, loadBench } from "../bench-sweeps.server.ts";
import { formatDate } from "../dates.ts";
import { type SweepAt, sweepAt, uncorrected } from "../shown-sweep.server.ts";
import { changedSince } from "../sweep-corrections.server.ts";
import { compareTrails, stripOf, trailOf } from "./gather-trails.server.ts";
import type { MaterialDip, MaterialSweep } from "./material.ts";
import type { PlateFigure } from "./record.ts";
import type { PlateSubject } from "./subject.ts";

export type OfProject = Pick<Project, "id" | "publicId" | "title" | "ituRegion">;

/** A sweep of the project with all that its part of a plate is made from. */
export interface GatheredSweep {
  found: sweeps.FoundSweep;
  at: SweepAt;
  material: MaterialSweep;
}

export interface Gathered {
  sweeps: GatheredSweep[];
  focus: string | null;
  trails: PlateFigure["trails"];
  steps: PlateFigure["steps"];
  bands: PlateFigure["bands"];
  bench: LoadedBench | null;
  /** What is proposed as title. */
  title: string;
}

/** Why there is no plate to be made, in words for its maker. */
export interface Problem {
  problem: string;
}

/** All that a subject of this project is drawn and computed from, as it is stored now; writes nothing. */
export async function gather(project: OfProject, subject: PlateSubject): Promise<Gathered | Problem> {
  const designBands = await projects.findDesignBands(project.id);
  const known = { focus: null, trails: [], steps: [], bench: null, bands: [] };
  const done = await gatherKind(project, subject, known, designBands);
  return "problem" in done ? done : { ...done, bands: bandsOf(project, designBands) };
}

async function gatherKind(
  project: OfProject,
  { kind, ids }: PlateSubject,
  known: Omit<Gathered, "sweeps" | "title">,
  designBands: readonly projects.DesignBand[],
): Promise<Gathered | Problem> {
  switch (kind) {
    case "sweep": {
      const one = await gatherSweep(project, ids[0]);
      return "problem" in one ? one : { ...known, sweeps: [one], title: one.found.sweep.title };
    }
    case "dip": {
      const found = await dips.findByPublicId(ids[0]);
      if (!found || found.dip.projectId !== project.id) return GONE;
      const one = await gatherSweep(project, found.sweep.publicId);
      if ("problem" in one) return one;
      if (!one.material.dips.some(({ id }) => id === ids[0])) return NOT_FOUND_NOW;
      const { frequencyHz, frequencyUncertaintyHz } = found.dip.numbers;
      const title = `The dip at ${formatFrequency(frequencyHz, frequencyUncertaintyHz)}, ${found.sweep.title}`;
      return { ...known, sweeps: [one], focus: ids[0], title };
    }
    case "compare": {
      const all = await gatherAll(project, ids);
      if ("problem" in all) return all;
      const trails = await compareTrails(project, all);
      return { ...known, sweeps: all, trails, title: all.map(({ found }) => found.sweep.title).join(" · ") };
    }
    case "trail": {
      const asked = await trailOf(project, ids[0], designBands);
      if (!asked) return GONE;
      const all = await gatherAll(project, asked.sweeps);
      return "problem" in all ? all : { ...known, sweeps: all, trails: [asked.trail], title: asked.title };
    }
    case "strip": {
      const asked = await stripOf(project, designBands);
      if (asked.sweeps.length === 0) return EMPTY;
      const all = await gatherAll(project, asked.sweeps);
      if ("problem" in all) return all;
      return { ...known, sweeps: all, trails: asked.trails, steps: asked.steps, title: project.title };
    }
    case "bench": {
      const found = await benches.findByPublicId(ids[0]);
      if (!found || found.bench.projectId !== project.id) return GONE;
      const versions = await benches.findVersions(found.bench.id);
      const version = versions.map((one) => one.version).sort((a, b) => +b.validFrom - +a.validFrom)[0];
      if (!version) return NO_REFERENCES;
      const bench = await loadBench(found.bench, version);
      if (!bench.correction.references.open && !bench.correction.references.short) return NO_REFERENCES;
      return { ...known, sweeps: [], bench, title: found.bench.name };
    }
    default:
      return kind satisfies never;
  }
}

/** In the order asked for; the first that can't be shown stops it. */
async function gatherAll(project: OfProject, ids: readonly string[]): Promise<GatheredSweep[] | Problem> {
  const all: GatheredSweep[] = [];
  // One after another: each holds the points of a whole sweep while it is corrected.
  for (const id of ids) {
    const one = await gatherSweep(project, id);
    if ("problem" in one) return one;
    all.push(one);
  }
  return all;
}

async function gatherSweep(project: OfProject, publicId: string): Promise<GatheredSweep | Problem> {
  const found = await sweeps.findByPublicId(publicId);
  if (!found || found.sweep.projectId !== project.id) return GONE;
  const { sweep, analysis } = found;
  const [at, listed] = await Promise.all([sweepAt(found), dips.findAllBySweep(sweep.id)]);
  if (!at || !analysis) return { problem: `“${sweep.title}” has no numbers yet: read it first.` };
  const stale = at.means.problem ?? changedSince(analysis.correction, at.means);
  if (stale) return { problem: `${stale} Analyse “${sweep.title}” anew first, then make the plate.` };
  const verdictOf = new Map(listed.map(({ dip }) => [dip.publicId, dip]));
  const material: MaterialSweep = {
    id: publicId,
    label: sweep.title,
    caption: sweep.takenAt ? formatDate(sweep.takenAt) : "no date",
    points: at.sweep,
    measured: uncorrected(at) ?? null,
    swrLimit: analysis.settings.swrLimit,
    dips: analysis.dips.map((dip): MaterialDip => {
      const known = verdictOf.get(dip.publicId);
      const verdict = known && known.verdict !== "open" ? `${known.verdict}: ${known.verdictText}` : "";
      return { ...dip, id: dip.publicId, label: "", verdict };
    }),
  };
  return { found, at, material };
}

function bandsOf(
  { ituRegion }: OfProject,
  designBands: readonly projects.DesignBand[],
): PlateFigure["bands"] {
  const design = designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz, design: true }));
  const all = bandsOverlapping((ituRegion as ItuRegion | null) ?? null, 0, Number.MAX_VALUE);
  const allocations = all
    .filter((a) => !design.some((b) => a.lowHz === b.lowHz && a.highHz === b.highHz))
    .map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz, design: false }));
  return [...design, ...allocations];
}

const GONE = { problem: "What the plate is to show is not in this project any more." };
const NOT_FOUND_NOW = {
  problem: "The sweep’s analysis does not find this dip any more, so there are no numbers to freeze.",
};
const EMPTY = { problem: "The project has no sweep with numbers yet: add one first." };
const NO_REFERENCES = {
  problem:
    "The bench has no open or short that is read, so there is nothing to say of it: add its references first.",
};
