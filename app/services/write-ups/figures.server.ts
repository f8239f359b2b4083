import * as dips from "~/db/dips.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as writeUps from "~/db/write-ups.server";
import { formatFrequency } from "~/measurement/units";
import { closeUpRange } from "../close-up.ts";
import { numberWords } from "../plates/number-words.ts";
import { type ShownDip, storedDips } from "../shown-dips.server.ts";
import { sweepAt } from "../shown-sweep.server.ts";
import { drawStretch } from "./draw-figure.server.tsx";
import { dipTable, sweepTable } from "./figure-numbers.ts";
import type { FrozenFigure } from "./frozen.ts";

type OfProject = Pick<projects.Project, "id" | "publicId" | "ituRegion">;

/** Plates, dips and sweeps of this project as they are now, each by "kind:id"; what is not there or not its own is missing. */
export async function loadFigures(project: OfProject, subjects: readonly string[]): Promise<FrozenFigure[]> {
  const designBands = await projects.findDesignBands(project.id);
  const plateIds = subjects.flatMap((one) => (one.startsWith("plate:") ? [one.slice(6)] : []));
  const plates = (await writeUps.findPlates(plateIds)).filter(({ projectId }) => projectId === project.id);
  const figures: FrozenFigure[] = plates.map(plateFigure);
  // One after another: each holds the points of a whole sweep.
  for (const subject of subjects) {
    const [kind, id] = subject.split(":");
    const figure =
      kind === "dip"
        ? await dipFigure(project, designBands, id)
        : kind === "sweep"
          ? await sweepFigure(project, designBands, id)
          : null;
    if (figure) figures.push(figure);
  }
  return figures;
}

function plateFigure(plate: Awaited<ReturnType<typeof writeUps.findPlates>>[number]): FrozenFigure {
  const { publicId, title } = plate;
  return {
    subject: `plate:${publicId}`,
    label: numberWords(plate),
    title,
    wide: null,
    narrow: null,
    numbers: null,
    path: `/plates/${publicId}`,
    asOf: null,
  };
}

async function dipFigure(
  project: OfProject,
  designBands: projects.DesignBand[],
  publicId: string,
): Promise<FrozenFigure | null> {
  const found = await dips.findByPublicId(publicId);
  if (!found || found.dip.projectId !== project.id) return null;
  const loaded = await loadSweep(found.sweep.publicId, designBands);
  if (!loaded) return null;
  const { numbers } = found.dip;
  const at = formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz);
  const title = `The dip at ${at} of the sweep ${found.sweep.title}`;
  const drawn =
    loaded.at &&
    drawStretch({
      ...loaded,
      at: loaded.at,
      designBands,
      ituRegion: project.ituRegion,
      range: closeUpRange(numbers, loaded.at.sweep),
      title,
    });
  return {
    subject: `dip:${publicId}`,
    label: null,
    title,
    wide: drawn?.wide ?? null,
    narrow: drawn?.narrow ?? null,
    numbers: dipTable(numbers, loaded.swrLimit),
    path: `/projects/${project.publicId}/dips/${publicId}`,
    asOf: new Date().toISOString(),
  };
}

async function sweepFigure(
  project: OfProject,
  designBands: projects.DesignBand[],
  publicId: string,
): Promise<FrozenFigure | null> {
  const loaded = await loadSweep(publicId, designBands);
  if (!loaded || loaded.sweep.projectId !== project.id) return null;
  const { at, sweep } = loaded;
  const hz = at?.sweep.frequencyHz;
  const title = `The sweep ${sweep.title}`;
  const drawn =
    at &&
    hz &&
    hz.length > 1 &&
    drawStretch({
      ...loaded,
      at,
      designBands,
      ituRegion: project.ituRegion,
      range: { fromHz: hz[0], toHz: hz[hz.length - 1] },
      title,
    });
  return {
    subject: `sweep:${publicId}`,
    label: null,
    title,
    wide: drawn ? drawn.wide : null,
    narrow: drawn ? drawn.narrow : null,
    numbers: sweepTable(loaded.dips, loaded.swrLimit),
    path: `/projects/${project.publicId}/sweeps/${publicId}`,
    asOf: new Date().toISOString(),
  };
}

/** A sweep at the plane of its stored analysis, with the dips of that. */
async function loadSweep(publicId: string, designBands: projects.DesignBand[]) {
  const found = await sweeps.findByPublicId(publicId);
  if (!found) return null;
  const [at, known] = await Promise.all([sweepAt(found), dips.findAllBySweep(found.sweep.id)]);
  const shown: ShownDip[] = storedDips(known, designBands);
  return { sweep: found.sweep, at, dips: shown, swrLimit: found.analysis?.settings.swrLimit };
}
