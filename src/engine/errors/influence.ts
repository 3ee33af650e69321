import { BLOCK, kernels, loadBlock } from "../kernels";
import type { Fit, Frame } from "../linear/types";
import { transposedTimes } from "./quadratic";
import { LEVERAGE_GAP } from "./robust";
import type { Covariance } from "./types";

/**
 * Influence on one combination of coefficients: per row for classical and HC errors, ψ_i = (row of (X'WX)⁻¹) x_i w_i e_i/(1 − h_i) (a row of
 * leverage 1 without its 1 − h); per cluster for CR1 (raw scores) and CR2 (adjusted scores). Σψ² is the variance that the shift's interval
 * rests on (CR1: times clusterFactor).
 * @param combination length p, aligned with fit.columns
 * @param into length n, to use instead of a fresh array for rows
 * @returns length n, or the number of clusters
 */
export function influence(frame: Frame, fit: Fit, cov: Covariance, combination: Float64Array, into?: Float64Array): Float64Array {
  const p = fit.columns.length;
  if (cov.clustered) {
    const t = transposedTimes(fit.rInverse, combination);
    const { scores, count } = cov.clustered;
    const out = new Float64Array(count);
    for (let j = 0; j < count; j++) for (let a = 0; a < p; a++) out[j] += scores[j * p + a] * t[a];
    return out;
  }
  const out = into ?? new Float64Array(frame.n);
  combineInto(out, frame, fit.columns, rawShares(fit, combination));
  for (let i = 0; i < out.length; i++) out[i] *= rowFactor(frame, cov, i);
  return out;
}

/** (X'WX)⁻¹ times a combination: a row's x times it is one combination of the raw columns, no need to whiten them all. Length p. */
export function rawShares(fit: Fit, combination: Float64Array): Float64Array {
  const p = fit.columns.length;
  const t = transposedTimes(fit.rInverse, combination);
  return Float64Array.from({ length: p }, (_, k) => {
    let share = 0;
    for (let j = k; j < p; j++) share += fit.rInverse[k * p + j] * t[j];
    return share;
  });
}

/** w e/(1 − h) of a row; of leverage 1 without its 1 − h. @param cov with residuals and leverages */
export function rowFactor(frame: Frame, cov: Covariance, row: number): number {
  return cov.residuals[row] * leverageFactor(frame, cov, row);
}

/** w/(1 − h) of a row, as rowFactor takes it. */
export function leverageFactor(frame: Frame, cov: Covariance, row: number): number {
  const left = 1 - cov.leverages![row];
  return (frame.weights ? frame.weights[row] : 1) / (left < LEVERAGE_GAP ? 1 : left);
}

/** out = Σ_k shares[k]·columns[k], length n. */
function combineInto(out: Float64Array, frame: Frame, columns: readonly number[], shares: Float64Array): void {
  const k = kernels();
  const w = k.room(2 * BLOCK);
  for (let start = 0; start < frame.n; start += BLOCK) {
    const height = Math.min(BLOCK, frame.n - start);
    const even = height + (height % 2);
    w.fill(0, 0, even);
    columns.forEach((column, j) => {
      if (shares[j] === 0) return;
      loadBlock(k, w, BLOCK, frame.columns[column], start, height);
      k.takeOut(0, 0, BLOCK, -shares[j], even);
    });
    out.set(w.subarray(0, height), start);
  }
}
