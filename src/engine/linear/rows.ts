import { BLOCK, kernels, loadBlock } from "../kernels";
import type { Fit, Frame } from "./types";

/** y − Xb, unweighted, length n. @param into buffer of length n to use instead of a fresh one */
export function residuals(frame: Frame, fit: Fit, into?: Float64Array): Float64Array {
  const e = into ?? new Float64Array(frame.n);
  if (fit.residualSumOfSquares === 0) return e.fill(0);
  const k = kernels();
  const w = k.room(2 * BLOCK);
  for (let start = 0; start < frame.n; start += BLOCK) {
    const height = Math.min(BLOCK, frame.n - start);
    const even = loadBlock(k, w, 0, frame.outcome, start, height);
    fit.columns.forEach((column, j) => {
      loadBlock(k, w, BLOCK, frame.columns[column], start, height);
      k.takeOut(0, 0, BLOCK, fit.coefficients[j], even);
    });
    e.set(w.subarray(0, height), start);
  }
  return e;
}

/**
 * Calls `visit` for each block of rows with the whitened rows √w·x'R⁻¹ (orthonormal columns over all rows): column j's row i at
 * u[j·BLOCK + i], zeros up to an even height. The one pass behind leverages and every robust error.
 * @param spare columns of free room to add after them; `visit` gets their first place
 */
export function whitenedBlocks(
  frame: Frame,
  fit: Fit,
  visit: (u: Float64Array, start: number, height: number, spare: number) => void,
  spare = 0,
): void {
  const p = fit.columns.length;
  const { n, weights, columns } = frame;
  const k = kernels();
  const u = k.room((2 * p + spare) * BLOCK);
  for (let start = 0; start < n; start += BLOCK) {
    const height = Math.min(BLOCK, n - start);
    const even = height + (height % 2);
    for (let j = 0; j < p; j++) {
      const raw = (p + j) * BLOCK;
      loadBlock(k, u, raw, columns[fit.columns[j]], start, height);
      if (weights) for (let i = 0; i < height; i++) u[raw + i] *= Math.sqrt(weights[start + i]);
      const at = j * BLOCK;
      k.times(at, raw, fit.rInverse[j * p + j], even);
      for (let i = 0; i < j; i++) {
        const share = fit.rInverse[i * p + j];
        if (share !== 0) k.takeOut(at, at, (p + i) * BLOCK, -share, even);
      }
    }
    visit(u, start, height, 2 * p * BLOCK);
  }
}
