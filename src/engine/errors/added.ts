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
 * The matrix is filled for the new columns only. Null where the fits do not nest so, or the kind needs clusters: use `covariance`.
 */
export function addedErrors(frame: Frame, start: Start, fit: Fit, kind: Variance): CoefficientErrors | null {
  const k = start.fit.columns.length;
  const nested = fit.columns.length > k && start.fit.columns.every((column, i) => fit.columns[i] === column);
  if (!nested || !start.cov.leverages || kind === "CR1" || kind === "CR2") return null;
  const shared = { kind, dfOf: () => fit.residualDf, clustered: null };
  if (kind === "classical") {
    const s2 = fit.residualSumOfSquares / fit.residualDf;
    return { ...shared, used: kind, matrix: fit.inverse.map((v) => v * s2) };
  }
  const found = addedMeat(frame, start, fit, kind);
  const used = found.leverageOne && (kind === "HC2" || kind === "HC3") ? "HC1" : kind;
  const { meat } = used === kind ? found : addedMeat(frame, start, fit, used);
  const factor = used === "HC1" ? frame.n / fit.residualDf : 1;
  return { ...shared, used, matrix: sandwich(fit.rInverse, meat, fit.columns.length).map((v) => v * factor) };
}

function addedMeat(
  frame: Frame,
  { fit: small, cov }: Start,
  fit: Fit,
  kind: Variance,
): { meat: Float64Array; leverageOne: boolean } {
  const p = fit.columns.length;
  const k = small.columns.length;
  const along = orthonormalCoefficients(fit);
  const meat = new Float64Array(p * p);
  const u = new Float64Array((p - k) * ROW_BLOCK);
  const square = new Float64Array(ROW_BLOCK);
  let leverageOne = false;
  for (let start = 0; start < frame.n; start += ROW_BLOCK) {
    const height = Math.min(ROW_BLOCK, frame.n - start);
    whitenAdded(frame, fit, k, start, height, u);
    for (let i = 0; i < height; i++) {
      const row = start + i;
      const root = frame.weights ? Math.sqrt(frame.weights[row]) : 1;
      let h = cov.leverages![row];
      let e = cov.residuals[row] * root;
      for (let j = k; j < p; j++) {
        const value = u[(j - k) * ROW_BLOCK + i];
        h += value * value;
        e -= value * along[j];
      }
      let left = 1 - h;
      if (left < LEVERAGE_GAP) {
        leverageOne = true;
        left = 1;
      }
      square[i] = (e * e) / (kind === "HC3" ? left * left : kind === "HC2" ? left : 1);
    }
    for (let a = k; a < p; a++) {
      for (let b = k; b <= a; b++) {
        const [x, y] = [(a - k) * ROW_BLOCK, (b - k) * ROW_BLOCK];
        let sum = 0;
        for (let i = 0; i < height; i++) sum += u[x + i] * u[y + i] * square[i];
        meat[a * p + b] += sum;
      }
    }
  }
  for (let a = 0; a < p; a++) for (let b = 0; b < a; b++) meat[b * p + a] = meat[a * p + b];
  return { meat, leverageOne };
}

/** The orthonormal columns k … p − 1 of a block of rows (√w-scaled), column-major. */
function whitenAdded(frame: Frame, fit: Fit, k: number, start: number, height: number, u: Float64Array): void {
  const p = fit.columns.length;
  u.fill(0);
  for (let j = k; j < p; j++) {
    const at = (j - k) * ROW_BLOCK;
    for (let i = 0; i <= j; i++) {
      const factor = fit.rInverse[i * p + j];
      const x = frame.columns[fit.columns[i]];
      for (let r = 0; r < height; r++) u[at + r] += factor * x[start + r];
    }
    if (frame.weights) for (let r = 0; r < height; r++) u[at + r] *= Math.sqrt(frame.weights[start + r]);
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
