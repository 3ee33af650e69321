import { BLOCK, kernels, loadBlock } from "../kernels";

/** Sums of squares between these are exact to rounding. */
export const SAFE_SQUARES = [1e-200, 1e200] as const;

/**
 * The power of two nearest the Euclidean norm of √w·x: dividing by it is exact and leaves a column of norm between 0.7 and 1.5.
 * Free of overflow: the largest entry is taken out first. 0 for an all-zero column.
 * @param x length n
 * @param weights length n, positive, or null
 */
export function powerOfTwoNorm(x: Float64Array, weights: Float64Array | null): number {
  const squares = sumOfSquares(x, weights);
  // within these bounds neither overflow nor underflow can have touched a square that counts
  if (squares > SAFE_SQUARES[0] && squares < SAFE_SQUARES[1]) return powerOfTwo(Math.sqrt(squares));
  let largest = 0;
  for (let i = 0; i < x.length; i++) {
    const size = Math.abs(x[i]);
    if (size > largest) largest = size;
  }
  if (largest === 0) return 0;
  const unit = powerOfTwo(largest);
  let sum = 0;
  if (weights) for (let i = 0; i < x.length; i++) sum += weights[i] * (x[i] / unit) * (x[i] / unit);
  else for (let i = 0; i < x.length; i++) sum += (x[i] / unit) * (x[i] / unit);
  const norm = Math.sqrt(sum);
  // A norm beyond double range is left to the unit alone: the factor stays finite.
  const scale = unit * powerOfTwo(norm);
  return Number.isFinite(scale) && scale > 0 ? scale : unit;
}

function sumOfSquares(x: Float64Array, weights: Float64Array | null): number {
  let sum = 0;
  if (weights) {
    for (let i = 0; i < x.length; i++) sum += weights[i] * x[i] * x[i];
    return sum;
  }
  const k = kernels();
  const w = k.room(BLOCK);
  for (let start = 0; start < x.length; start += BLOCK) {
    const even = loadBlock(k, w, 0, x, start, Math.min(BLOCK, x.length - start));
    sum += k.dot(0, 0, even);
  }
  return sum;
}

/** 2^round(log₂ x) for x > 0. */
export function powerOfTwo(x: number): number {
  return 2 ** Math.min(1023, Math.max(-1022, Math.round(Math.log2(x))));
}
