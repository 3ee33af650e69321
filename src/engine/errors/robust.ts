import { ROW_BLOCK, whitenedBlocks } from "../linear/rows";
import type { Fit, Frame } from "../linear/types";
import type { Variance } from "../plan";

/** 1 − h below this is a leverage of 1: what is left is rounding. */
export const LEVERAGE_GAP = 1e-10;

/** Σ u u' w e² a², whitened (p × p), with a row's a = 1 (HC0, HC1), (1−h)^−½ (HC2) or (1−h)^−1 (HC3). */
export function robustMeat(frame: Frame, fit: Fit, e: Float64Array, h: Float64Array | null, kind: Variance): Float64Array {
  const p = fit.columns.length;
  const meat = new Float64Array(p * p);
  const square = new Float64Array(ROW_BLOCK);
  whitenedBlocks(frame, fit, (u, start, height) => {
    for (let i = 0; i < height; i++) {
      const row = start + i;
      const w = frame.weights ? frame.weights[row] : 1;
      const left = kind === "HC3" ? (1 - h![row]) ** 2 : kind === "HC2" ? 1 - h![row] : 1;
      square[i] = (w * e[row] * e[row]) / left;
    }
    for (let j = 0; j < p; j++) {
      for (let k = 0; k <= j; k++) {
        let sum = 0;
        for (let i = 0; i < height; i++) sum += u[j * ROW_BLOCK + i] * u[k * ROW_BLOCK + i] * square[i];
        meat[j * p + k] += sum;
      }
    }
  });
  for (let j = 0; j < p; j++) for (let k = 0; k < j; k++) meat[k * p + j] = meat[j * p + k];
  return meat;
}
