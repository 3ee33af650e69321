/** The one table of tolerances, relative unless said otherwise, each with its reason. */
export const TOLERANCE = {
  /** Coefficients and standard errors against R (METHODS 11). */
  coefficient: 1e-10,
  /** p values, interval ends and degrees of freedom against R (METHODS 11). */
  inference: 1e-8,
  /** Parts against their sum, relative to the shift (issue of the linear engine). */
  sum: 1e-10,
  /** Two orders of the same sums: rounding only. */
  reordered: 1e-9,
} as const;

/** |found − expected| relative to the larger of |expected| and `scale` (the size of what was subtracted to get here). */
export function relativeError(found: number, expected: number, scale = 0): number {
  if (Object.is(found, expected) || found === expected) return 0;
  return Math.abs(found - expected) / Math.max(Math.abs(expected), scale, Number.MIN_VALUE);
}
