import type { Fit, Frame } from "../linear/types";
import { transposedTimes } from "./quadratic";
import { LEVERAGE_GAP } from "./robust";
import type { Covariance } from "./types";

/**
 * Influence on one combination of coefficients: per row for classical and HC errors, ψ_i = (row of (X'WX)⁻¹) x_i w_i e_i/(1 − h_i) (a row of
 * leverage 1 without its 1 − h); per cluster for CR1 (raw scores) and CR2 (adjusted scores). Σψ² is the variance that the shift's interval
 * rests on (CR1: times clusterFactor).
 * @param combination length p, aligned with fit.columns
 * @returns length n, or the number of clusters
 */
export function influence(frame: Frame, fit: Fit, cov: Covariance, combination: Float64Array): Float64Array {
  const p = fit.columns.length;
  const t = transposedTimes(fit.rInverse, combination);
  if (cov.clustered) {
    const { scores, count } = cov.clustered;
    const out = new Float64Array(count);
    for (let j = 0; j < count; j++) for (let a = 0; a < p; a++) out[j] += scores[j * p + a] * t[a];
    return out;
  }
  // (X'WX)⁻¹-row times x is one combination of the raw columns: no need to whiten them all
  const out = new Float64Array(frame.n);
  for (let k = 0; k < p; k++) {
    let share = 0;
    for (let j = k; j < p; j++) share += fit.rInverse[k * p + j] * t[j];
    if (share === 0) continue;
    const x = frame.columns[fit.columns[k]];
    for (let i = 0; i < out.length; i++) out[i] += share * x[i];
  }
  for (let i = 0; i < out.length; i++) {
    const left = 1 - cov.leverages![i];
    const w = frame.weights ? frame.weights[i] : 1;
    out[i] *= (w * cov.residuals[i]) / (left < LEVERAGE_GAP ? 1 : left);
  }
  return out;
}
