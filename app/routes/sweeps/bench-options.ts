import type { ListedBench } from "~/db/benches.server";

/** Benches as a form offers them, those of other places with whose they are. */
export function benchOptions(benches: readonly ListedBench[], project: string) {
  return benches.map(({ bench, owner, home }) => ({
    value: bench.publicId,
    label: home.publicId === project ? bench.name : `${bench.name} (${owner ?? "a member"}'s own)`,
  }));
}
