import type { Estimate, SetResult } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { quadratic } from "../errors/quadratic";
import { wald } from "../errors/wald";
import type { Fit } from "../linear/types";
import { tCritical, tTwoSided } from "../probability";
import type { SetFit } from "./set";

/** Below this doubles lose digits. */
const SMALLEST = 2 ** -1022;

/** A contrast's estimate with error, interval and p. An exact fit has error 0, the point as its interval, and no p. */
export function estimateOf({ fit, cov }: SetFit, { column, factor }: ContrastColumn, level: number): Estimate {
  const combination = Float64Array.from(fit.columns, (c) => (c === column ? factor : 0));
  const estimate = fit.coefficients[fit.columns.indexOf(column)] * factor;
  if (!cov) return { estimate, standardError: null, df: null, interval: null, p: null };
  const exact = fit.residualSumOfSquares === 0;
  const standardError = exact ? 0 : errorOf(cov.matrix, fit, column, factor);
  const df = exact ? fit.residualDf : cov.dfOf(combination);
  if (!Number.isFinite(standardError) || df === null) return { estimate, standardError: null, df: null, interval: null, p: null };
  if (standardError === 0) return { estimate, standardError, df, interval: [estimate, estimate], p: null };
  const half = tCritical(level, df) * standardError;
  return {
    estimate,
    standardError,
    df,
    interval: [estimate - half, estimate + half],
    p: tTwoSided(estimate / standardError, df),
  };
}

/** NaN where scaling took a positive error below double range: an error of 0 would claim certainty. */
function errorOf(matrix: Float64Array, fit: Fit, column: number, factor: number): number {
  const combination = unit(fit, column);
  const own = Math.sqrt(quadratic(matrix, combination, combination));
  const scaled = own * Math.abs(factor);
  return own > 0 && scaled < SMALLEST ? NaN : scaled;
}

/** Test that all contrasts of several groups are zero; null for fewer than two, or where it cannot be computed. */
export function jointOf(design: Design, { fit, cov, reasons }: SetFit): SetResult["joint"] {
  const columns = design.contrasts.filter((c, i) => c.column >= 0 && reasons[i] === null).map((c) => c.column);
  if (!cov || design.contrasts.length < 2 || columns.length < design.contrasts.length || fit.residualSumOfSquares === 0)
    return null;
  return wald(
    design.frame,
    fit,
    cov,
    columns.map((column) => unit(fit, column)),
  );
}

function unit(fit: Fit, column: number): Float64Array {
  return Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0));
}
