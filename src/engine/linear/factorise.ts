import { inHalves } from "../passes/halves";
import type { Passing } from "../passes/types";
import { powerOfTwoNorm } from "./scale";
import type { Factor, Frame } from "./types";

/** Rows reduced at a time: a block of this height and thirty columns stays in the second-level cache. */
const BLOCK_ROWS = 256;
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
  // the second triangle's rows are folded in like a block's: column-major, q rows each
  if (second) {
    const rows = new Float64Array(q * q);
    for (let i = 0; i < q; i++) for (let j = i; j < q; j++) rows[j * q + i] = second[0][i * q + j];
    foldBlock(r, q, rows, q, q);
  }
  return { n, size: q - 1, r, scale };
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
  const block = new Float64Array(BLOCK_ROWS * q);
  const roots = weights ? new Float64Array(BLOCK_ROWS) : null;
  for (let start = from, count = 0; start < to; start += BLOCK_ROWS, count++) {
    if (count % BLOCKS_A_LOOK === 0) stop();
    const height = Math.min(BLOCK_ROWS, to - start);
    if (roots) for (let i = 0; i < height; i++) roots[i] = Math.sqrt(weights![start + i]);
    for (let c = 0; c < q; c++) {
      const source = columns[c];
      const inverse = scale[c];
      const at = c * BLOCK_ROWS;
      if (inverse === 0) block.fill(0, at, at + height);
      else if (roots) for (let i = 0; i < height; i++) block[at + i] = (source[start + i] / inverse) * roots[i];
      else for (let i = 0; i < height; i++) block[at + i] = source[start + i] / inverse;
    }
    foldBlock(r, q, block, BLOCK_ROWS, height);
  }
}

/** Replaces R (row-major q × q, upper) by the R of [R; block]; block is column-major with `stride` rows a column, `height` of them used. */
export function foldBlock(r: Float64Array, q: number, block: Float64Array, stride: number, height: number): void {
  for (let j = 0; j < q; j++) {
    const at = j * stride;
    let below = 0;
    for (let i = 0; i < height; i++) below += block[at + i] * block[at + i];
    if (below === 0) continue;
    const alpha = r[j * q + j];
    const norm = Math.sqrt(alpha * alpha + below);
    const beta = alpha > 0 ? -norm : norm;
    const head = alpha - beta;
    // reflector v = [head; block column]; H = I − (2 / v'v) v v', and v'v = −2·beta·head
    const factor = -1 / (beta * head);
    r[j * q + j] = beta;
    for (let k = j + 1; k < q; k++) {
      const other = k * stride;
      let dot = head * r[j * q + k];
      for (let i = 0; i < height; i++) dot += block[at + i] * block[other + i];
      if (dot === 0) continue;
      const step = dot * factor;
      r[j * q + k] -= step * head;
      for (let i = 0; i < height; i++) block[other + i] -= step * block[at + i];
    }
  }
}
