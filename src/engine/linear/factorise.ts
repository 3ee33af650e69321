import { stopIf } from "../cancelled";
import { powerOfTwoNorm } from "./scale";
import type { Factor, Frame } from "./types";

/** Rows reduced at a time: a block of this height and thirty columns stays in the second-level cache. */
const BLOCK_ROWS = 256;
/** Blocks between two looks at the cancel flag. */
const BLOCKS_A_LOOK = 16;

/**
 * Reduces [columns, outcome] (rows times √w, columns divided by a power of two near their norm) to a triangular R in one pass:
 * each block of rows is folded into R by Householder reflections that use R's triangular shape (TSQR, Demmel et al. 2012; Golub & Van
 * Loan, Matrix Computations, 5.2). Block borders depend on n alone, so the result does not depend on the machine.
 * Cost about 2·n·(size + 1)² multiplications; every later fit is solved from R alone.
 * @throws Cancelled
 */
export function factorise(frame: Frame, cancelled?: () => boolean): Factor {
  const { n, weights } = frame;
  const all = [...frame.columns, frame.outcome];
  const q = all.length;
  const scale = Float64Array.from(all, (column) => powerOfTwoNorm(column, weights));
  const r = new Float64Array(q * q);
  const block = new Float64Array(BLOCK_ROWS * q);
  const roots = weights ? new Float64Array(BLOCK_ROWS) : null;
  for (let start = 0, count = 0; start < n; start += BLOCK_ROWS, count++) {
    if (count % BLOCKS_A_LOOK === 0) stopIf(cancelled);
    const height = Math.min(BLOCK_ROWS, n - start);
    if (roots) for (let i = 0; i < height; i++) roots[i] = Math.sqrt(weights![start + i]);
    for (let c = 0; c < q; c++) {
      const source = all[c];
      const inverse = scale[c] === 0 ? 0 : scale[c];
      const at = c * BLOCK_ROWS;
      if (inverse === 0) block.fill(0, at, at + height);
      else if (roots) for (let i = 0; i < height; i++) block[at + i] = (source[start + i] / inverse) * roots[i];
      else for (let i = 0; i < height; i++) block[at + i] = source[start + i] / inverse;
    }
    foldBlock(r, q, block, BLOCK_ROWS, height);
  }
  return { n, size: q - 1, r, scale };
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
