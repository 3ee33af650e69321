/** Rows of a block, and so the length of a column in the buffer. */
export const BLOCK = 256;

/** Doubles in a result: Σ of the meat, Σ of the shift's squares, the smallest 1 − h (read first, then lowered). */
export const RESULT = 3;

/**
 * The inner loops of a pass over the rows, on one block. All columns are stretches of one buffer, so that the loops stay in the cache;
 * offsets name a column's first row. A target's column is followed by the outcome's and by the leverages'.
 * Heights are even: rows of zeros after the last add nothing.
 */
export interface Kernels {
  /** A buffer of at least so many doubles; an earlier one is no longer good. */
  room(doubles: number): Float64Array;
  /** to = from − share·x. */
  takeOut(to: number, from: number, x: number, share: number, height: number): void;
  /** to = factor·x. */
  times(to: number, x: number, factor: number, height: number): void;
  /** to = x·y, row by row. */
  multiply(to: number, x: number, y: number, height: number): void;
  /** Σ x·y. */
  dot(x: number, y: number, height: number): number;
  /** to = from + inverse·x²: the leverage that a column adds. */
  addLeverage(to: number, from: number, x: number, inverse: number, height: number): void;
  /** A path's last column x and its one target under HC3 in one loop: nothing is written but the result, for nothing follows. */
  leaf(x: number, from: number, last: Last, height: number, result: number): void;
  /** As leaf, with the shift's square. @param base column of the base fit's influences */
  leafShift(x: number, from: number, last: Last, weight: number, base: number, height: number, result: number): void;
  /** As leaf, with what is left of target, outcome and leverage written for the columns that follow. */
  step(x: number, from: number, to: number, last: Last, height: number, result: number): void;
  /** As step, with the shift's square. */
  stepShift(x: number, from: number, to: number, last: Last, weight: number, base: number, height: number, result: number): void;
}

/** Numbers of a path's last column and its one target (see Node and Finish). */
export interface Last {
  readonly inverseX: number;
  readonly shareTarget: number;
  readonly shareOutcome: number;
  readonly share: number;
  readonly inverse: number;
}
