import { invertUpper, outer } from "./triangular";
import type { Factor, Fit } from "./types";

/**
 * A column counts as determined by the columns before it when what is left of it is below this share of its own norm. Rounding of exact
 * dependences leaves a few 1e-16 (times a small power of the number of columns); NIST's Filip, the hardest set that doubles still
 * resolve, keeps about 1e-13 with centred powers.
 */
const DEPENDENT = 2e-14;
/** Residual sums of squares below this share of the outcome's own are rounding: the fit is exact. */
const EXACT = 1e-28;
/** Coefficients of a dependence (on unit-norm columns) below this are rounding. */
const MATERIAL = 1e-8;

/**
 * Least squares on some of the factored columns, in the order given, from R alone (cost free of n): the wanted columns of R are reduced to
 * a triangle again. A column that earlier ones determine is set aside with the columns it is a combination of (the constant, column 0, is
 * not named); the rest are fitted.
 * @param wanted frame column indexes, without repeats
 * @param outcome column of the factor that is fitted: the outcome, or a design column for an auxiliary fit
 */
export function fitColumns(factor: Factor, wanted: readonly number[], outcome = factor.size): Fit {
  const { size, r, scale } = factor;
  const q = size + 1;
  const p = wanted.length;
  // R has no more rows than it was made from, and no rank beyond them.
  const height = Math.min(q, factor.n);
  // Work matrix: wanted columns and the outcome, column-major, `height` rows each.
  const work = new Float64Array((p + 1) * height);
  [...wanted, outcome].forEach((c, k) => {
    for (let i = 0; i <= c && i < height; i++) work[k * height + i] = r[i * q + c];
  });
  const kept: number[] = [];
  const setAside: { column: number; combinationOf: number[] }[] = [];
  for (let k = 0; k < p; k++) {
    const row = kept.length;
    const left = tailNorm(work, k * height, row, height);
    const whole = Math.hypot(left, headNorm(work, k * height, row));
    if (whole === 0 || left <= DEPENDENT * whole || row >= height) {
      setAside.push({ column: wanted[k], combinationOf: dependence(work, height, kept, k).map((i) => wanted[i]) });
      continue;
    }
    reflect(work, height, k, row, left, p);
    kept.push(k);
  }
  const size2 = kept.length;
  const triangle = new Float64Array(size2 * size2);
  kept.forEach((k, column) => {
    for (let i = 0; i <= column; i++) triangle[i * size2 + column] = work[k * height + i];
  });
  const columns = kept.map((k) => wanted[k]);
  const inverse = invertUpper(triangle, size2);
  const rest = tailNorm(work, p * height, size2, height);
  const outcomeNorm = Math.hypot(rest, headNorm(work, p * height, size2));
  const outcomeScale = scale[outcome];
  const coefficients = new Float64Array(size2);
  for (let i = 0; i < size2; i++) {
    let sum = 0;
    for (let j = i; j < size2; j++) sum += inverse[i * size2 + j] * work[p * height + j];
    coefficients[i] = (sum / scale[columns[i]]) * outcomeScale;
  }
  for (let i = 0; i < size2; i++) for (let j = i; j < size2; j++) inverse[i * size2 + j] /= scale[columns[i]];
  const exact = rest * rest <= EXACT * outcomeNorm * outcomeNorm;
  return {
    columns,
    setAside,
    coefficients,
    residualDf: factor.n - size2,
    residualSumOfSquares: exact || outcomeScale === 0 ? 0 : (rest * outcomeScale) ** 2,
    inverse: outer(inverse, size2),
    rInverse: inverse,
  };
}

function headNorm(work: Float64Array, at: number, rows: number): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) sum += work[at + i] * work[at + i];
  return Math.sqrt(sum);
}

function tailNorm(work: Float64Array, at: number, from: number, to: number): number {
  let sum = 0;
  for (let i = from; i < to; i++) sum += work[at + i] * work[at + i];
  return Math.sqrt(sum);
}

/** Householder reflection that leaves column k with `left` (up to sign) in `row` and zeros below, applied to all later columns. */
function reflect(work: Float64Array, q: number, k: number, row: number, left: number, last: number): void {
  const at = k * q;
  const beta = work[at + row] > 0 ? -left : left;
  const head = work[at + row] - beta;
  const factor = -1 / (beta * head);
  for (let c = k + 1; c <= last; c++) {
    const other = c * q;
    let dot = head * work[other + row];
    for (let i = row + 1; i < q; i++) dot += work[at + i] * work[other + i];
    const step = dot * factor;
    work[other + row] -= step * head;
    for (let i = row + 1; i < q; i++) work[other + i] -= step * work[at + i];
  }
  work[at + row] = beta;
  work.fill(0, at + row + 1, at + q);
}

/** Positions (in the wanted list) of the kept columns that column k is a combination of, the constant left out. */
function dependence(work: Float64Array, q: number, kept: readonly number[], k: number): number[] {
  const weights = new Float64Array(kept.length);
  for (let i = kept.length - 1; i >= 0; i--) {
    let sum = work[k * q + i];
    for (let j = i + 1; j < kept.length; j++) sum -= work[kept[j] * q + i] * weights[j];
    weights[i] = sum / work[kept[i] * q + i];
  }
  return kept.filter((at, i) => at !== 0 && Math.abs(weights[i]) > MATERIAL);
}
