import { leverageFactor, rawShares, rowFactor } from "../errors/influence";
import { BLOCK, kernels, loadBlock } from "../kernels";
import type { Frame } from "../linear/types";
import type { Fitted } from "./parts";

/** What one covariate's part of a shift depends on, row by row. */
export interface RowPart {
  /** Of the full fit's coefficients: Σ γ β̂ over the covariate's columns. */
  readonly combination: Float64Array;
  /** By frame column, its share in Σ β·(residual of the covariate's column from the base columns). */
  readonly residual: ReadonlyMap<number, number>;
}

/**
 * Σ over rows of each part's influence squared, ψ = γψ(β) + ψ(γ)β, in one pass for all parts: ψ(β) is the full fit's row factor times a
 * combination of its columns, ψ(γ) the base fit's leverage factor and its row's weight in the contrast times a residual.
 * @param contrast the base fit's combination of coefficients that is the contrast
 */
export function partSquares(
  frame: Frame,
  base: Fitted,
  full: Fitted,
  contrast: Float64Array,
  parts: readonly RowPart[],
): Float64Array {
  const columns = [...new Set([...full.fit.columns, ...base.fit.columns])];
  const placeOf = new Map(columns.map((column, i) => [column, i * BLOCK]));
  const after = columns.length * BLOCK;
  const [fullFactor, baseFactor, ofBeta, ofGamma] = [0, 1, 2, 3].map((i) => after + i * BLOCK);
  const betaShares = parts.map(({ combination }) => rawShares(full.fit, combination));
  const leverShares = rawShares(base.fit, contrast);
  const k = kernels();
  const w = k.room(after + 4 * BLOCK);
  const sums = new Float64Array(parts.length);
  for (let start = 0; start < frame.n; start += BLOCK) {
    const height = Math.min(BLOCK, frame.n - start);
    const even = height + (height % 2);
    const add = (to: number, column: number, share: number) => {
      if (share !== 0) k.takeOut(to, to, placeOf.get(column)!, -share, even);
    };
    for (const [column, at] of placeOf) loadBlock(k, w, at, frame.columns[column], start, height);
    w.fill(0, after, after + 4 * BLOCK);
    for (let i = 0; i < height; i++) w[fullFactor + i] = rowFactor(frame, full.cov, start + i);
    base.fit.columns.forEach((column, j) => add(baseFactor, column, leverShares[j]));
    for (let i = 0; i < height; i++) w[baseFactor + i] *= leverageFactor(frame, base.cov, start + i);
    parts.forEach(({ residual }, part) => {
      w.fill(0, ofBeta, ofBeta + 2 * BLOCK);
      full.fit.columns.forEach((column, j) => add(ofBeta, column, betaShares[part][j]));
      for (const [column, share] of residual) add(ofGamma, column, share);
      k.multiply(ofBeta, ofBeta, fullFactor, even);
      k.multiply(ofGamma, ofGamma, baseFactor, even);
      k.takeOut(ofBeta, ofBeta, ofGamma, -1, even);
      sums[part] += k.dot(ofBeta, ofBeta, even);
    });
  }
  return sums;
}
