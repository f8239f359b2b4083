import type { ProjectAccess } from "~/auth/require.server";
import * as benches from "~/db/benches.server";
import { notFound } from "~/errors";
import { compareBenches } from "~/measurement/correction/compare";
import { qualifyBench } from "~/measurement/correction/qualify";
import { maySeeBench } from "~/services/bench-access.server";
import { loadBench, usableBenches } from "~/services/bench-sweeps.server";
import { formatDate } from "~/services/dates";
import { numbersOf } from "./bench-page.server";
import { benchScene } from "./bench-scene";
import type { Wish } from "./benches.schema";
import { pickVersion } from "./require-bench.server";

/**
 * A version of a bench beside another one of it, or beside another bench (its newest version). Where nothing is said, the version
 * before it; where there is none, nothing is compared yet.
 */
export async function loadComparison(
  access: ProjectAccess,
  { bench }: benches.FoundBench,
  wish: Wish,
  versionId: string | null,
  withId: string | null,
) {
  const [versions, usable] = await Promise.all([
    benches.findVersions(bench.id),
    access.may("sweep.add") ? usableBenches(access.project.id) : benches.findAllByProject(access.project.id),
  ]);
  const { version } = pickVersion(versions, versionId);
  const others = versions.filter((one) => one.version.id !== version.id);
  const before = versions[versions.findIndex((one) => one.version.id === version.id) + 1] ?? others[0];
  const asked = withId ?? before?.version.publicId ?? null;
  const other = asked ? await requireOther(access, asked) : null;
  const choices = [
    ...others.map((one) => ({ value: one.version.publicId, label: nameOf(bench, one.version, true) })),
    ...usable
      .filter((row) => row.bench.id !== bench.id)
      .map((row) => ({ value: row.bench.publicId, label: row.bench.name })),
  ];
  const head = {
    project: { publicId: access.project.publicId },
    bench: { publicId: bench.publicId, name: bench.name },
    version: version.publicId,
    choices,
    other: asked,
  };
  if (!other) return { ...head, words: [], scene: null, numbers: [], names: [] };
  const pair = [{ bench, version }, other] as const;
  const qualities = await Promise.all(
    pair.map(async (one) => qualifyBench((await loadBench(one.bench, one.version)).correction, wish)),
  );
  const laterIsOther = other.bench.id === bench.id && other.version.validFrom > version.validFrom;
  const [first, second] = laterIsOther ? qualities : [qualities[1], qualities[0]];
  const same = other.bench.id === bench.id;
  return {
    ...head,
    words: compareBenches(first, second).words,
    scene: benchScene(qualities, wish),
    numbers: qualities.map(numbersOf),
    names: pair.map((one) => nameOf(one.bench, one.version, same)),
  };
}

/** The version that an id names, or the newest one of the bench that it names, if it may be seen here. */
async function requireOther(access: ProjectAccess, publicId: string) {
  const version = await benches.findVersionByPublicId(publicId);
  const bench = version?.bench ?? (await benches.findByPublicId(publicId))?.bench;
  if (!bench || !(await maySeeBench(access, bench))) throw notFound("bench to compare with");
  return {
    bench,
    version: version?.version ?? pickVersion(await benches.findVersions(bench.id), null).version,
  };
}

function nameOf(bench: benches.BenchRow, version: benches.BenchVersionRow, numbered: boolean): string {
  return numbered
    ? `Version ${version.number}, from ${formatDate(version.validFrom)}`
    : `${bench.name}, from ${formatDate(version.validFrom)}`;
}
