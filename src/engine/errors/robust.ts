import { BLOCK, kernels } from "../kernels";
import { whitenedBlocks } from "../linear/rows";
import type { Fit, Frame } from "../linear/types";
import type { Variance } from "../plan";

/** 1 − h below this is a leverage of 1: what is left is rounding. */
export const LEVERAGE_GAP = 1e-10;

/**
 * Leverages and Σ u u' w e² a², whitened (p × p), in one pass over the rows, with a row's a = 1 (HC0, HC1), (1−h)^−½ (HC2) or (1−h)^−1
 * (HC3; a row of leverage 1 counts with a = 1: the caller falls back).
 * @param e unweighted residuals, length n
 * @param h filled with the leverages, length n
 * @param from first column whose meat is wanted; the rows and columns before stay 0
 */
export function robustMeat(frame: Frame, fit: Fit, e: Float64Array, h: Float64Array, kind: Variance, from: number): Float64Array {
  const p = fit.columns.length;
  const meat = new Float64Array(p * p);
  const k = kernels();
  const visit = (u: Float64Array, start: number, height: number, spare: number) => {
    const even = height + (height % 2);
    const [square, scaled] = [spare, spare + BLOCK];
    u.fill(0, square, square + even);
    for (let j = 0; j < p; j++) k.addLeverage(square, square, j * BLOCK, 1, even);
    for (let i = 0; i < height; i++) {
      const row = start + i;
      h[row] = u[square + i] > 1 ? 1 : u[square + i];
      const left = 1 - h[row] < LEVERAGE_GAP ? 1 : 1 - h[row];
      const w = frame.weights ? frame.weights[row] : 1;
      u[square + i] = (w * e[row] * e[row]) / (kind === "HC3" ? left * left : kind === "HC2" ? left : 1);
    }
    for (let a = from; a < p; a++) {
      k.multiply(scaled, a * BLOCK, square, even);
      for (let b = from; b <= a; b++) meat[a * p + b] += k.dot(scaled, b * BLOCK, even);
    }
  };
  whitenedBlocks(frame, fit, visit, 2);
  for (let a = 0; a < p; a++) for (let b = 0; b < a; b++) meat[b * p + a] = meat[a * p + b];
  return meat;
}
