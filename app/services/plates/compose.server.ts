import { env } from "~/env.server";
import { ANALYSIS_VERSION } from "~/measurement/analyse";
import type { Sweep } from "~/measurement/sweep";
import { limitsOf } from "../shown-sweep.server.ts";
import { defaultsFor, type PlateChoices } from "./choices.ts";
import { CODE_VERSION } from "./code-version.ts";
import { figureOf } from "./figure.ts";
import { type Gathered, type GatheredSweep, gather, type OfProject, type Problem } from "./gather.server.ts";
import { licenceOf } from "./licences.ts";
import type { Material } from "./material.ts";
import type { UnnumberedRecord } from "./record.ts";
import { type SourceToKeep, sourcesOf } from "./sources.server.ts";
import { type PlateSubject, subjectText } from "./subject.ts";
import { tablesOf } from "./tables.ts";
import { BENCH_WISH } from "./wish.ts";

/** A plate as it would be frozen now. */
export interface Composed {
  record: UnnumberedRecord;
  sources: SourceToKeep[];
  /** With all their points, for CSV and Touchstone. */
  sweeps: ComposedSweep[];
}

interface ComposedSweep {
  id: string;
  title: string;
  sweep: Sweep;
  limits: { low: Float64Array; high: Float64Array } | undefined;
}

/** Puts a plate together from what the project holds now; writes nothing. */
export async function compose(
  project: OfProject,
  subject: PlateSubject,
  choices: PlateChoices,
): Promise<Composed | Problem> {
  const gathered = await gather(project, subject);
  return "problem" in gathered ? gathered : composed(project, subject, choices, gathered);
}

/** The choices that are proposed for a subject. */
export async function propose(
  project: OfProject & { licence?: string | null },
  subject: PlateSubject,
): Promise<PlateChoices | Problem> {
  const gathered = await gather(project, subject);
  if ("problem" in gathered) return gathered;
  const title = Array.from(gathered.title).slice(0, 160).join("");
  const licence = licenceOf(project.licence ?? "")?.id;
  const plain = defaultsFor({ title, licence });
  // The figure says how far it reaches; a dip's close-up is no wide one.
  const { frequency } = figureOf(materialOf(subject, plain, gathered));
  return defaultsFor({ title, licence, span: frequency });
}

function composed(
  project: OfProject,
  subject: PlateSubject,
  choices: PlateChoices,
  gathered: Gathered,
): Composed {
  const figure = figureOf(materialOf(subject, choices, gathered));
  const sources = sourcesOf(gathered);
  return {
    sources,
    sweeps: gathered.sweeps.map(({ found, at }) => ({
      id: found.sweep.publicId,
      title: found.sweep.title,
      sweep: at.sweep,
      limits: limitsOf(at.sweep),
    })),
    record: {
      kind: subject.kind,
      subject: subjectText(subject),
      title: choices.title,
      caption: choices.caption,
      licence: licenceOf(choices.licence),
      people: peopleOf(gathered.sweeps),
      project: { title: project.title, address: `${env.BASE_URL}/projects/${project.publicId}` },
      figure,
      tables: tablesOf(subject.kind, figure),
      sources: sources.map(({ source }) => source),
      choices,
      code: { version: CODE_VERSION, analysisVersion: ANALYSIS_VERSION },
    },
  };
}

function materialOf(subject: PlateSubject, choices: PlateChoices, gathered: Gathered): Material {
  const { focus, bands, trails, steps, bench } = gathered;
  const called = (id: string, label: string) => choices.labels[id] || label;
  return {
    kind: subject.kind,
    choices,
    sweeps: gathered.sweeps.map(({ material }) => ({
      ...material,
      label: called(material.id, material.label),
      dips: material.dips.map((dip) => ({ ...dip, label: called(dip.id, dip.label) })),
    })),
    focus,
    bands,
    trails: trails.map((trail) => ({ ...trail, label: called(trail.id, trail.label) })),
    steps: steps.map((step) => ({ ...step, label: called(step.id, step.label) })),
    bench: bench && { correction: bench.correction, wish: BENCH_WISH },
  };
}

/** Whoever added a sweep, once, in the order of the sweeps. */
function peopleOf(sweeps: readonly GatheredSweep[]): UnnumberedRecord["people"] {
  const names = sweeps.flatMap(({ found }) => found.by ?? []);
  return [...new Set(names)].map((name) => {
    const own = sweeps.filter(({ found }) => found.by === name).length;
    return { name, part: own === 1 ? "added the sweep" : `added ${own} sweeps` };
  });
}
