import type { PlanChange } from "../protocol";

/** True where the change answers what a guess had answered before: which columns the question is about. */
export function settlesGuess(change: PlanChange): boolean {
  return change.key === "outcome" || change.key === "exposure" || change.key === "covariates";
}
