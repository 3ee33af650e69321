import { dotDoubled, residualDoubled } from "./doubled";
import { factorise } from "./factorise";
import { fitColumns } from "./fit";
import { residuals } from "./rows";
import type { Factor, Fit, Frame } from "./types";

/** Rounds of refinement; each gains up to 15 digits less the logarithm of the condition number. */
const ROUNDS = 3;
/** A well-conditioned fit is as good as refined already: coefficients are off by about condition · 1e-16. With many rows refining is dear. */
const WELL_CONDITIONED = { few: 30, many: 300 };
const MANY_ROWS = 20_000;

/**
 * The same fit with its coefficients refined by Björck's (1967) iteration on the augmented system, residuals accumulated in doubled
 * precision: the digits that plain doubles lose to a near dependence come back, also where the residuals are large.
 * A fit that needs none of it (well conditioned) is returned as it is.
 */
export function refine(frame: Frame, factor: Factor, fit: Fit): Fit {
  const p = fit.columns.length;
  if (p === 0 || fit.residualDf < 0) return fit;
  if (condition(factor, fit) < WELL_CONDITIONED[frame.n > MANY_ROWS ? "many" : "few"]) return fit;
  const columns = fit.columns.map((c) => frame.columns[c]);
  const b = Float64Array.from(fit.coefficients);
  let r = residuals(frame, fit);
  for (let round = 0; round < ROUNDS; round++) {
    const f = residualDoubled(frame.outcome, r, columns, b);
    const wr = frame.weights ? r.map((value, i) => value * frame.weights![i]) : r;
    const g = Float64Array.from(columns, (x) => -dotDoubled(x, wr));
    const inner = fitColumns(
      factorise({ ...frame, columns, outcome: f }),
      columns.map((_, k) => k),
    );
    if (inner.setAside.length > 0 || inner.coefficients.some((value) => !Number.isFinite(value))) return fit;
    // δb = R⁻¹(Q'f − R⁻ᵀg) = (least squares of f) − R⁻¹R⁻ᵀg
    const step = inner.coefficients;
    const h = multiplyTransposed(inner.rInverse, g, p);
    for (let i = 0; i < p; i++) for (let j = i; j < p; j++) step[i] -= inner.rInverse[i * p + j] * h[j];
    for (let i = 0; i < p; i++) b[i] += step[i];
    const next = new Float64Array(frame.n);
    for (let i = 0; i < frame.n; i++) {
      let sum = f[i];
      for (let k = 0; k < p; k++) sum -= columns[k][i] * step[k];
      next[i] = r[i] + sum;
    }
    r = next;
    if (step.every((value, i) => Math.abs(value) <= 1e-16 * Math.abs(b[i]))) break;
  }
  if (b.some((value) => !Number.isFinite(value))) return fit;
  return { ...fit, coefficients: b };
}

/** Condition number of the columns scaled to unit norm, from above (Frobenius norms). */
function condition(factor: Factor, fit: Fit): number {
  const p = fit.columns.length;
  let inverse = 0;
  for (let j = 0; j < p; j++) inverse += squaredNorm(factor, fit.columns[j]) * fit.inverse[j * p + j];
  return Math.sqrt(p * inverse);
}

/** Σ w x² of a frame's column: R's column has its norm. */
function squaredNorm({ r, size, scale }: Factor, column: number): number {
  let sum = 0;
  for (let i = 0; i <= column; i++) sum += r[i * (size + 1) + column] ** 2;
  return sum * scale[column] * scale[column];
}

/** U'·v of an upper triangle. */
function multiplyTransposed(upper: Float64Array, v: Float64Array, p: number): Float64Array {
  const out = new Float64Array(p);
  for (let j = 0; j < p; j++) for (let i = 0; i <= j; i++) out[j] += upper[i * p + j] * v[i];
  return out;
}
