/** The numbers all models of a comparison are built from, on the common rows. Never changed once made. */
export interface Frame {
  /** Rows. */
  readonly n: number;
  /** Columns of every design, each of length n; column 0 is the constant 1. Centred and scaled by the design already. */
  readonly columns: readonly Float64Array[];
  /** Length n. */
  readonly outcome: Float64Array;
  /** Length n, all > 0; null when every row counts alike. */
  readonly weights: Float64Array | null;
  readonly clusters: Clusters | null;
}

export interface Clusters {
  /** Cluster of each row, 0 … count − 1; length n. */
  readonly codes: Int32Array;
  readonly count: number;
}

/** [columns, outcome] of a frame (rows times √w) reduced to a triangular R, with the unit-norm scale of each column. Opaque outside linear/. */
export interface Factor {
  readonly n: number;
  /** Number of design columns; R is (size + 1) square, the outcome last. */
  readonly size: number;
  /** Row-major upper triangle, (size + 1)². */
  readonly r: Float64Array;
  /** Length size + 1: what each column was divided by before factoring. */
  readonly scale: Float64Array;
}

/** One least-squares fit on some of a frame's columns. */
export interface Fit {
  /** Frame column indexes that have a coefficient, in the order asked for. */
  readonly columns: readonly number[];
  /** Columns left out because earlier ones already determine them (empty combinationOf: constant, or all zero). */
  readonly setAside: readonly { readonly column: number; readonly combinationOf: readonly number[] }[];
  /** Aligned with `columns`. */
  readonly coefficients: Float64Array;
  /** n − columns.length; may be ≤ 0. */
  readonly residualDf: number;
  /** Σ w e². Exactly 0 where it is 0 to working precision. */
  readonly residualSumOfSquares: number;
  /** (X'WX)⁻¹, row-major p × p, p = columns.length. */
  readonly inverse: Float64Array;
  /** R⁻¹ of the fit (upper triangular, row-major p × p): X·R⁻¹ has orthonormal columns, its row norms² are leverages (√w-scaled). */
  readonly rInverse: Float64Array;
}
