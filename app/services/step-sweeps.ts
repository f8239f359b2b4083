/** Which sweeps stand before and after a step: those nearest to it by date, unless a person said otherwise. */

export interface DatedSweep {
  id: number;
  takenAt: Date | null;
  createdAt: Date;
}

export interface DatedStep {
  id: number;
  state: "planned" | "done";
  at: Date | null;
  beforeSweepId: number | null;
  afterSweepId: number | null;
}

export interface Around<S extends DatedSweep> {
  before: S | null;
  after: S | null;
  /** Said by a person, not found by date. */
  beforeSaid: boolean;
  afterSaid: boolean;
}

/** @param sweeps oldest first; a sweep of the step's very moment counts as after it. */
export function sweepsAround<S extends DatedSweep>(step: DatedStep, sweeps: readonly S[]): Around<S> {
  const said = (id: number | null) =>
    id === null ? null : (sweeps.find((sweep) => sweep.id === id) ?? null);
  const [beforeSaid, afterSaid] = [said(step.beforeSweepId), said(step.afterSweepId)];
  const at = step.state === "done" && step.at ? step.at.getTime() : Number.POSITIVE_INFINITY;
  return {
    before: beforeSaid ?? sweeps.findLast((sweep) => timeOf(sweep) < at) ?? null,
    after: afterSaid ?? sweeps.find((sweep) => timeOf(sweep) >= at) ?? null,
    beforeSaid: beforeSaid !== null,
    afterSaid: afterSaid !== null,
  };
}

/** The other done steps that lie between the same sweeps: what each of them did can't be told apart. */
export function stepsBetween<T extends DatedStep>(
  step: T,
  steps: readonly T[],
  sweeps: readonly DatedSweep[],
): T[] {
  const { before, after } = sweepsAround(step, sweeps);
  if (!before || !after || step.state !== "done") return [];
  const [from, to] = [timeOf(before), timeOf(after)];
  return steps.filter((other) => {
    if (other.id === step.id || other.state !== "done" || !other.at) return false;
    const at = other.at.getTime();
    return at > from && at <= to;
  });
}

function timeOf({ takenAt, createdAt }: DatedSweep): number {
  return (takenAt ?? createdAt).getTime();
}
