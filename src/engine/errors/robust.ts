import { ROW_BLOCK, whitenedBlocks } from "../linear/rows";
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
  const square = new Float64Array(ROW_BLOCK);
  whitenedBlocks(frame, fit, (u, start, height) => {
    square.fill(0);
    for (let j = 0; j < p; j++) {
      const at = j * ROW_BLOCK;
      for (let i = 0; i < height; i++) square[i] += u[at + i] * u[at + i];
    }
    for (let i = 0; i < height; i++) {
      const row = start + i;
      h[row] = square[i] > 1 ? 1 : square[i];
      const left = 1 - h[row] < LEVERAGE_GAP ? 1 : 1 - h[row];
      const w = frame.weights ? frame.weights[row] : 1;
      square[i] = (w * e[row] * e[row]) / (kind === "HC3" ? left * left : kind === "HC2" ? left : 1);
    }
    for (let j = from; j < p; j++) {
      for (let k = from; k <= j; k++) {
        let sum = 0;
        for (let i = 0; i < height; i++) sum += u[j * ROW_BLOCK + i] * u[k * ROW_BLOCK + i] * square[i];
        meat[j * p + k] += sum;
      }
    }
  });
  for (let j = 0; j < p; j++) for (let k = 0; k < j; k++) meat[k * p + j] = meat[j * p + k];
  return meat;
}
