import type { ExpectedPlace, StepQuantity } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";

/** Where a planned step should put every trail of the project. */
export async function expectedAfter(
  _projectId: number,
  _quantities: readonly StepQuantity[],
  _unit: LengthUnit,
): Promise<ExpectedPlace[]> {
  return [];
}
