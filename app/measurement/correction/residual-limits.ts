import type { BenchGiven, BenchStandards } from "../bench.ts";
import { returnLossDbToGamma } from "../reflection.ts";
import type { BenchLimits } from "../sweep.ts";

/**
 * What is left after a three-term correction, as worst-case limits, length n. A load that was taken as perfect and
 * returns ρ leaves exactly Γ − Γc = ρ(1 − Γc²)/(1 + ρ·Γc) (own derivation from the equations of `solveTerms`, with open
 * and short as described), so at most ρ + ρ²·abs Γc + ρ/(1 − ρ)²·abs Γc². It follows that the directivity left is the
 * load's own return loss and no correction can prove more: a load of which nothing is known leaves NaN, not zero. ρ
 * comes from the load's known return loss, else from the directivity that the bench is said to have. The given
 * test-port match and tracking are floors: open and short other than described leave such errors too.
 */
export function residualLimits(n: number, standards: BenchStandards, given: BenchGiven): BenchLimits {
  const knownDb = standards.loadReturnLossDb ?? given.directivityDb;
  const rho = knownDb === null ? Number.NaN : returnLossDbToGamma(knownDb);
  const tracking = given.trackingDb === null ? 0 : 10 ** (given.trackingDb / 20) - 1;
  const match = given.testPortMatchDb === null ? 0 : returnLossDbToGamma(given.testPortMatchDb);
  return {
    directivity: new Float64Array(n).fill(rho),
    tracking: new Float64Array(n).fill(Math.max(tracking, rho * rho)),
    match: new Float64Array(n).fill(
      Math.max(match, rho < 1 ? rho / (1 - rho) ** 2 : rho >= 1 ? 1 : Number.NaN),
    ),
  };
}
