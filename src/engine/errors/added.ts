import { combineColumns, triangleColumns } from "../linear/combine";
import { ROW_BLOCK } from "../linear/rows";
import type { Fit, Frame } from "../linear/types";
import type { Variance } from "../plan";
import { sandwich } from "./quadratic";
import { LEVERAGE_GAP } from "./robust";
import type { CoefficientErrors, Covariance } from "./types";

/** A fit whose rows are known already: its leverages and residuals. */
export interface Start {
  readonly fit: Fit;
  readonly cov: Covariance;
}

/**
 * Errors of the coefficients that a fit has beyond a smaller one it begins with (the same first columns): leverages and residuals are carried
 * on from the smaller fit by the few new orthonormal columns, so a test of added columns costs a fraction of a fit's own pass.
 * The matrix is filled from column `from` on only. Null where the fits do not nest so, or the kind needs clusters: use `covariance`.
 */
export function addedErrors(frame: Frame, start: Start, fit: Fit, kind: Variance, from: number): CoefficientErrors | null {
  const k = start.fit.columns.length;
  const nested = from >= k && fit.columns.length > from && start.fit.columns.every((column, i) => fit.columns[i] === column);
  if (!nested || kind === "CR1" || kind === "CR2") return null;
  const shared = { kind, dfOf: () => fit.residualDf, clustered: null };
  if (kind === "classical") {
    const s2 = fit.residualSumOfSquares / fit.residualDf;
    return { ...shared, used: kind, matrix: fit.inverse.map((v) => v * s2) };
  }
  if (!start.cov.leverages) return null;
  const found = addedMeat(frame, start, fit, kind, from);
  const used = found.leverageOne && (kind === "HC2" || kind === "HC3") ? "HC1" : kind;
  const { meat } = used === kind ? found : addedMeat(frame, start, fit, used, from);
  const factor = used === "HC1" ? frame.n / fit.residualDf : 1;
  return { ...shared, used, matrix: sandwich(fit.rInverse, meat, fit.columns.length).map((v) => v * factor) };
}

function addedMeat(
  frame: Frame,
  { fit: small, cov }: Start,
  fit: Fit,
  kind: Variance,
  from: number,
): { meat: Float64Array; leverageOne: boolean } {
  const p = fit.columns.length;
  const k = small.columns.length;
  const along = orthonormalCoefficients(fit);
  const meat = new Float64Array(p * p);
  const u = new Float64Array((p - k) * ROW_BLOCK);
  const columns = fit.columns.map((c) => frame.columns[c]);
  const factors = triangleColumns(fit.rInverse, p, k);
  const h = new Float64Array(ROW_BLOCK);
  const e = new Float64Array(ROW_BLOCK);
  let leverageOne = false;
  for (let start = 0; start < frame.n; start += ROW_BLOCK) {
    const height = Math.min(ROW_BLOCK, frame.n - start);
    for (let j = k; j < p; j++) {
      const at = (j - k) * ROW_BLOCK;
      combineColumns(u, at, columns, factors[j - k], j + 1, start, height);
      if (frame.weights) for (let i = 0; i < height; i++) u[at + i] *= Math.sqrt(frame.weights[start + i]);
    }
    for (let i = 0; i < height; i++) {
      h[i] = cov.leverages![start + i];
      e[i] = cov.residuals[start + i] * (frame.weights ? Math.sqrt(frame.weights[start + i]) : 1);
    }
    for (let j = k; j < p; j++) {
      const at = (j - k) * ROW_BLOCK;
      const step = along[j];
      for (let i = 0; i < height; i++) {
        const value = u[at + i];
        h[i] += value * value;
        e[i] -= value * step;
      }
    }
    for (let i = 0; i < height; i++) {
      let left = 1 - h[i];
      if (left < LEVERAGE_GAP) {
        leverageOne = true;
        left = 1;
      }
      // from here on the residual's scaled square
      e[i] = (e[i] * e[i]) / (kind === "HC3" ? left * left : kind === "HC2" ? left : 1);
    }
    addProducts(meat, p, k, from, u, e, height);
  }
  for (let a = 0; a < p; a++) for (let b = 0; b < a; b++) meat[b * p + a] = meat[a * p + b];
  return { meat, leverageOne };
}

/** meat += Σ u_a u_b·scaled over a block's rows, for a ≥ b ≥ from; u starts at column k. */
function addProducts(
  meat: Float64Array,
  p: number,
  k: number,
  from: number,
  u: Float64Array,
  scaled: Float64Array,
  height: number,
): void {
  const weighted = new Float64Array(height);
  for (let a = from; a < p; a++) {
    const x = (a - k) * ROW_BLOCK;
    for (let i = 0; i < height; i++) weighted[i] = u[x + i] * scaled[i];
    let b = from;
    for (; b + 1 <= a; b += 2) {
      const y = (b - k) * ROW_BLOCK;
      const z = y + ROW_BLOCK;
      let first = 0;
      let second = 0;
      for (let i = 0; i < height; i++) {
        const w = weighted[i];
        first += w * u[y + i];
        second += w * u[z + i];
      }
      meat[a * p + b] += first;
      meat[a * p + b + 1] += second;
    }
    if (b <= a) {
      const y = (b - k) * ROW_BLOCK;
      let sum = 0;
      for (let i = 0; i < height; i++) sum += weighted[i] * u[y + i];
      meat[a * p + b] += sum;
    }
  }
}

/** Q'y: the outcome's coefficients on the orthonormal columns, from b = R⁻¹Q'y by back substitution. */
function orthonormalCoefficients({ rInverse, coefficients }: Fit): Float64Array {
  const p = coefficients.length;
  const out = new Float64Array(p);
  for (let j = p - 1; j >= 0; j--) {
    let sum = coefficients[j];
    for (let i = j + 1; i < p; i++) sum -= rInverse[j * p + i] * out[i];
    out[j] = sum / rInverse[j * p + j];
  }
  return out;
}
