import { BLOCK, kernels, loadBlock } from "../kernels";
import type { Kernels } from "../kernels";
import { inHalves } from "../passes/halves";
import type { Passing } from "../passes/types";
import { powerOfTwoNorm } from "./scale";
import type { Factor, Frame } from "./types";

/** Blocks between two looks at the cancel flag. */
const BLOCKS_A_LOOK = 16;

/** A stretch of rows to be reduced to a triangle. */
export interface FactorTask {
  readonly kind: "factor";
  /** The design's columns and the outcome. */
  readonly columns: readonly Float64Array[];
  /** By column, what its values are divided by. */
  readonly scale: Float64Array;
  readonly weights: Float64Array | null;
  readonly from: number;
  readonly to: number;
}

/**
 * Reduces [columns, outcome] (rows times √w, columns divided by a power of two near their norm) to a triangular R in one pass:
 * each block of rows is folded into R by Householder reflections that use R's triangular shape (TSQR, Demmel et al. 2012; Golub & Van
 * Loan, Matrix Computations, 5.2). Borders and order of merging depend on n alone, so the result does not depend on the machine.
 * Cost about 2·n·(size + 1)² multiplications; every later fit is solved from R alone.
 * @throws Cancelled
 */
export function factorise(frame: Frame, passing: Passing = {}): Factor {
  const { n, weights } = frame;
  const columns = [...frame.columns, frame.outcome];
  const scale = Float64Array.from(columns, (column) => powerOfTwoNorm(column, weights));
  const [[r], second] = inHalves(n, (from, to) => ({ kind: "factor", columns, scale, weights, from, to }), passing);
  const q = columns.length;
  if (second) foldTriangle(r, second[0], q);
  return { n, size: q - 1, r, scale };
}

/** Folds another triangle into R: its rows like a block's. */
function foldTriangle(r: Float64Array, other: Float64Array, q: number): void {
  const k = kernels();
  const w = k.room(q * BLOCK);
  for (let start = 0; start < q; start += BLOCK) {
    const height = Math.min(BLOCK, q - start);
    w.fill(0, 0, q * BLOCK);
    for (let i = 0; i < height; i++) for (let j = start + i; j < q; j++) w[j * BLOCK + i] = other[(start + i) * q + j];
    foldBlock(k, r, q, height + (height % 2), q);
  }
}

/** Length of the triangle that `factorRows` fills. */
export function factorSizes({ columns }: FactorTask): number[] {
  return [columns.length ** 2];
}

/** Folds a stretch of rows into a triangle R (row-major, columns.length²). @param stop looked at between blocks; may throw */
export function factorRows(
  { columns, scale, weights, from, to }: FactorTask,
  [r]: readonly Float64Array[],
  stop: () => void,
): void {
  const q = columns.length;
  const k = kernels();
  const w = k.room(q * BLOCK);
  for (let start = from, count = 0; start < to; start += BLOCK, count++) {
    if (count % BLOCKS_A_LOOK === 0) stop();
    const height = Math.min(BLOCK, to - start);
    for (let c = 0; c < q; c++) {
      const at = c * BLOCK;
      // a power of two, so that its inverse is exact; below it a subnormal scale would have none
      const inverse = scale[c] === 0 ? 0 : 1 / scale[c];
      if (Number.isFinite(inverse)) loadBlock(k, w, at, columns[c], start, height, inverse);
      else {
        loadBlock(k, w, at, columns[c], start, height);
        for (let i = 0; i < height; i++) w[at + i] /= scale[c];
      }
      if (weights) for (let i = 0; i < height; i++) w[at + i] *= Math.sqrt(weights[start + i]);
    }
    // what m rows hold is used up after m columns: beyond them stands rounding
    foldBlock(k, r, q, height + (height % 2), Math.min(q, start + height - from));
  }
}

/**
 * Replaces R (row-major q × q, upper) by the R of [R; block]; column c of the block stands at c·BLOCK of the buffer, `height` rows, an even
 * number. @param rank rows that R and block are made of, at most q
 */
function foldBlock(kernel: Kernels, r: Float64Array, q: number, height: number, rank: number): void {
  for (let j = 0; j < rank; j++) {
    const at = j * BLOCK;
    const below = kernel.dot(at, at, height);
    if (below === 0) continue;
    const alpha = r[j * q + j];
    const norm = Math.sqrt(alpha * alpha + below);
    const beta = alpha > 0 ? -norm : norm;
    const head = alpha - beta;
    // reflector v = [head; block column]; H = I − (2 / v'v) v v', and v'v = −2·beta·head
    const factor = -1 / (beta * head);
    r[j * q + j] = beta;
    for (let k = j + 1; k < q; k++) {
      const other = k * BLOCK;
      const dot = head * r[j * q + k] + kernel.dot(at, other, height);
      if (dot === 0) continue;
      const step = dot * factor;
      r[j * q + k] -= step * head;
      kernel.takeOut(other, other, at, step, height);
    }
  }
}
