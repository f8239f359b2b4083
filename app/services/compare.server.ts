import { effectiveRole, mayInProject } from "~/auth/permissions";
import * as compare from "~/db/compare.server";
import type { DesignBand } from "~/db/projects.server";
import { type BandFigures, bandFigures } from "~/measurement/band-figures";
import { type Difference, differenceOf } from "~/measurement/difference";
import { dipRows } from "~/measurement/dip-rows";
import { type Movement, movementsBetween } from "~/measurement/movement";
import type { Dip } from "~/measurement/sweep";
import { bandsAsked } from "./bands.server.ts";
import { type SweepAt, sweepAt } from "./shown-sweep.server.ts";

/** A dip in a comparison. */
export interface ComparedDip extends Dip {
  publicId: string;
  trail: string | null;
  trailName: string;
}

export interface ComparedSweep extends compare.AskedSweep {
  at: SweepAt;
  /** Ascending; those at the sweep's end among them. */
  dips: ComparedDip[];
}

export interface Chosen {
  /** In the order asked for. */
  compared: ComparedSweep[];
  /** Readable, but without numbers yet. */
  unread: compare.AskedSweep[];
  /** Ids that stand for nothing that this person may read: absent and hidden are not told apart. */
  missing: string[];
}

/** Sweeps of any projects, each checked against what the person may read there. */
export async function chooseSweeps(publicIds: readonly string[], userId: number | null): Promise<Chosen> {
  const found = await compare.findSweeps(publicIds, userId);
  const asked = publicIds.map((id) => found.find(({ sweep }) => sweep.publicId === id));
  const readable = asked.filter((one) => one !== undefined).filter(mayRead);
  const rows = await compare.findDips(readable.map(({ sweep }) => sweep.id));
  const loaded = await Promise.all(
    readable.map(async (one) => {
      const at = one.analysis && (await sweepAt(one));
      const dips = rows.filter(({ sweepId }) => sweepId === one.sweep.id).map(comparedDip);
      return at ? { ...one, at, dips } : null;
    }),
  );
  const compared = loaded.filter((one) => one !== null);
  const seen = new Set(readable.map(({ sweep }) => sweep.publicId));
  const read = new Set(compared.map(({ sweep }) => sweep.publicId));
  return {
    compared,
    unread: readable.filter(({ sweep }) => !read.has(sweep.publicId)),
    missing: publicIds.filter((id) => !seen.has(id)),
  };
}

export interface ComparedRow {
  /** In the order of the sweeps; null where a sweep shows none. */
  cells: { dip: ComparedDip | null; movement: Movement<ComparedDip> | null }[];
}

/** The dips side by side, each with how far it lies from the reference sweep's. Dips at a sweep's end are in no row. */
export function rowsOf(sweeps: readonly ComparedSweep[], reference: number): ComparedRow[] {
  const inner = sweeps.map(({ project, dips }) => ({
    project: project.publicId,
    dips: dips
      .filter(({ edge }) => !edge)
      .map((dip) => ({ ...dip, id: dip.publicId, widthHz: widthOf(dip) })),
  }));
  const rows = dipRows(inner);
  const rowOf = new Map(
    rows.flatMap((row, i) => row.flatMap((dip) => (dip ? [[dip.publicId, `${i}`] as const] : []))),
  );
  const sideOf = ({ at, dips }: ComparedSweep) => ({
    startHz: at.sweep.frequencyHz[0],
    stopHz: at.sweep.frequencyHz[at.sweep.frequencyHz.length - 1],
    dips,
  });
  const movements = sweeps.map((sweep, i) =>
    i === reference
      ? []
      : movementsBetween(
          sideOf(sweeps[reference]),
          sideOf(sweep),
          ({ publicId }) => rowOf.get(publicId) ?? null,
        ),
  );
  return rows.map((row) => ({
    cells: row.map((dip, i) => ({
      dip,
      movement:
        movements[i].find(({ before, after }) =>
          dip
            ? after?.publicId === dip.publicId
            : before !== null && before.publicId === row[reference]?.publicId,
        ) ?? null,
    })),
  }));
}

/** What each sweep has more in return loss than the reference, over the range that both cover; null for the reference. */
export function differencesFrom(sweeps: readonly ComparedSweep[], reference: number): (Difference | null)[] {
  const base = sweeps[reference]?.at.sweep;
  return sweeps.map(({ at }, i) => (i === reference || !base ? null : differenceOf(base, at.sweep)));
}

export interface ComparedBand {
  name: string;
  lowHz: number;
  highHz: number;
  limitSwr: number;
  design: boolean;
  /** In the order of the sweeps. */
  figures: BandFigures[];
}

/** Design bands and allocations that one of the sweeps touches. */
export function bandsOf(
  sweeps: readonly ComparedSweep[],
  region: number | null,
  designBands: readonly DesignBand[],
  swrLimit: number,
): ComparedBand[] {
  const ends = sweeps.flatMap(({ at: { sweep } }) => [
    sweep.frequencyHz[0],
    sweep.frequencyHz[sweep.frequencyHz.length - 1],
  ]);
  const bands = bandsAsked(region, designBands, Math.min(...ends), Math.max(...ends));
  const figures = sweeps.map(({ at, dips }) => bandFigures(at.sweep, bands, dips, swrLimit));
  return bands.map(({ name, lowHz, highHz, design }, i) => ({
    name,
    lowHz,
    highHz,
    design,
    limitSwr: figures[0]?.[i].limitSwr ?? swrLimit,
    figures: figures.map((own) => own[i]),
  }));
}

function mayRead({ role, project }: compare.AskedSweep): boolean {
  return mayInProject(effectiveRole(role, project.visibility), "project.read");
}

function comparedDip({ numbers, publicId, trail, trailName }: compare.ComparedDipRow): ComparedDip {
  return { ...numbers, publicId, trail, trailName: trailName ?? "" };
}

function widthOf({ bandwidth }: Dip): number | null {
  return bandwidth && !bandwidth.open ? bandwidth.widthHz : null;
}
