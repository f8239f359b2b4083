import type { Quantity, Sweep, Warning } from "../sweep.ts";
import type { BenchReferences, ReferenceRole } from "./references.ts";

/** How the files behind the sweeps were read, where that is known. */
export type ReadAs = Partial<Record<"sweep" | ReferenceRole, { quantity: Quantity; zeroDb?: number | null }>>;

/** Faults of the references themselves. */
export function referenceFaults(_sweep: Sweep, _references: BenchReferences, _readAs: ReadAs): Warning[] {
  return [];
}
