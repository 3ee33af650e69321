import { combineColumns, triangleColumns } from "./combine";
import type { Fit, Frame } from "./types";

/** Rows worked on at a time, so that a block of whitened columns stays in the cache. */
export const ROW_BLOCK = 256;

/** y − Xb, unweighted, length n. @param into buffer of length n to use instead of a fresh one */
export function residuals(frame: Frame, fit: Fit, into?: Float64Array): Float64Array {
  const e = into ?? new Float64Array(frame.n);
  e.set(frame.outcome);
  if (fit.residualSumOfSquares === 0) return e.fill(0);
  fit.columns.forEach((c, k) => {
    const x = frame.columns[c];
    const b = fit.coefficients[k];
    for (let i = 0; i < e.length; i++) e[i] -= b * x[i];
  });
  return e;
}

/**
 * Calls `visit` for each block of rows with the whitened rows √w·x'R⁻¹ (orthonormal columns over all rows), column-major with
 * ROW_BLOCK rows a column: the one pass behind leverages and every robust error.
 */
export function whitenedBlocks(frame: Frame, fit: Fit, visit: (u: Float64Array, start: number, height: number) => void): void {
  const p = fit.columns.length;
  const u = new Float64Array(p * ROW_BLOCK);
  const { n, weights } = frame;
  const columns = fit.columns.map((c) => frame.columns[c]);
  const factors = triangleColumns(fit.rInverse, p, 0);
  for (let start = 0; start < n; start += ROW_BLOCK) {
    const height = Math.min(ROW_BLOCK, n - start);
    for (let j = 0; j < p; j++) {
      const at = j * ROW_BLOCK;
      combineColumns(u, at, columns, factors[j], j + 1, start, height);
      if (weights) for (let i = 0; i < height; i++) u[at + i] *= Math.sqrt(weights[start + i]);
    }
    visit(u, start, height);
  }
}

/** Leverages h = w·x'(X'WX)⁻¹x, each in [0, 1], length n. */
export function leverages(frame: Frame, fit: Fit): Float64Array {
  const h = new Float64Array(frame.n);
  const p = fit.columns.length;
  whitenedBlocks(frame, fit, (u, start, height) => {
    for (let j = 0; j < p; j++) {
      const at = j * ROW_BLOCK;
      for (let i = 0; i < height; i++) h[start + i] += u[at + i] * u[at + i];
    }
  });
  for (let i = 0; i < h.length; i++) if (h[i] > 1) h[i] = 1;
  return h;
}
