import * as dips from "~/db/dips.server";
import { findPublicExample } from "~/db/examples.server";
import * as projects from "~/db/projects.server";
import { bandsOverlapping, type ItuRegion } from "~/measurement/bands";
import { decodePoints } from "~/services/points.server";
import { storedDips } from "~/services/shown-dips.server";

/** A public sweep, ready to be drawn; null while there is none. */
export async function loadExample() {
  const found = await findPublicExample();
  if (!found?.sweep.preview) return null;
  const { project, sweep, settings } = found;
  const [known, bands] = await Promise.all([
    dips.findAllBySweep(sweep.id),
    projects.findDesignBands(project.id),
  ]);
  const points = decodePoints([sweep.preview as Buffer]);
  const fromHz = sweep.startHz ?? points.frequencyHz[0];
  const toHz = sweep.stopHz ?? points.frequencyHz[points.frequencyHz.length - 1];
  return {
    project: { publicId: project.publicId, title: project.title, demo: project.demo === 1 },
    sweep: { publicId: sweep.publicId, title: sweep.title },
    swrLimit: settings.swrLimit,
    fromHz,
    toHz,
    points: {
      frequencyHz: Array.from(points.frequencyHz, (hz) => Number(hz.toPrecision(8))),
      magnitude: Array.from(points.magnitude, (value) => Number(value.toPrecision(5))),
    },
    dips: storedDips(known, bands),
    designBands: bands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
    bands: bandsOverlapping((project.ituRegion as ItuRegion | null) ?? null, fromHz, toHz),
  };
}

export type Example = NonNullable<Awaited<ReturnType<typeof loadExample>>>;
