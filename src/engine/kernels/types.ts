/** Rows of a block, and so the length of a column in the buffer. */
export const BLOCK = 256;

/** Doubles of a model's sums: Σ of the meat, Σ of the shift's squares, the smallest 1 − h. */
export const RESULT = 3;

/** Doubles of an order. */
export const ORDER = 9;

/**
 * One thing to do with a block, as it stands in the buffer: four 32-bit integers (what, to, from, x), six doubles, two integers (base,
 * result). "takeOut" and "addLeverage" use the first of the doubles alone.
 */
export interface Order {
  readonly what: "takeOut" | "addLeverage" | "leaf" | "leafShift" | "step" | "stepShift";
  readonly to: number;
  readonly from: number;
  readonly x: number;
  /** Share or inverse; or inverseX, shareTarget, shareOutcome, share, inverse and, with a shift, weight. */
  readonly numbers: readonly number[];
  /** Column of the base fit's influences. */
  readonly base: number;
  /** Where the model's sums stand. */
  readonly result: number;
}

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
  /**
   * Does the orders that stand from `at` to `end`. A leaf is a path's last column x and its one target under HC3 in one loop; a step also
   * writes what is left of target, outcome and leverage, for the columns that follow. Both add to the sums at `result`.
   */
  run(at: number, end: number, height: number): void;
}
