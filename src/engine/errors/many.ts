import type { Factor, Fit, Frame } from "../linear/types";
import type { Passing } from "../passes/types";
import type { Variance } from "../plan";
import { treeErrors } from "../tree";
import { classicalErrors } from "./classical";
import { covariance } from "./covariance";
import type { Scratch } from "./covariance";
import type { CoefficientErrors } from "./types";

/**
 * Errors of the same last coefficients in many fits: classical ones from the fits, HC kinds by one pass over the rows for all, and what that
 * pass is not good for (clusters, near dependences, rows of leverage 1) one by one. Only the block of the targets is filled.
 * Null for a fit that has none of the targets.
 * @param targets frame columns, in the order they stand at the end of the fits
 * @throws Cancelled
 */
export function manyErrors(
  frame: Frame,
  factor: Factor,
  fits: readonly Fit[],
  targets: readonly number[],
  kind: Variance,
  passing: Passing,
): (CoefficientErrors | null)[] {
  if (kind === "classical") return fits.map(classicalErrors);
  const together = treeErrors({ frame, factor, targets, kind, base: null, passing }, fits);
  let scratch: Scratch | undefined;
  return fits.map((fit, i) => {
    const found = together[i];
    if (found) return found.errors;
    const from = fit.columns.findIndex((column) => targets.includes(column));
    if (from < 0) return null;
    scratch ??= { e: new Float64Array(frame.n), h: new Float64Array(frame.n) };
    return covariance(frame, fit, kind, from, scratch);
  });
}
