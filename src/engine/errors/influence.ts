import { ROW_BLOCK, whitenedBlocks } from "../linear/rows";
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
  const out = new Float64Array(frame.n);
  whitenedBlocks(frame, fit, (u, start, height) => {
    for (let j = 0; j < p; j++) {
      if (t[j] === 0) continue;
      for (let i = 0; i < height; i++) out[start + i] += t[j] * u[j * ROW_BLOCK + i];
    }
  });
  for (let i = 0; i < out.length; i++) {
    const left = 1 - cov.leverages![i];
    const root = frame.weights ? Math.sqrt(frame.weights[i]) : 1;
    out[i] *= (root * cov.residuals[i]) / (left < LEVERAGE_GAP ? 1 : left);
  }
  return out;
}
