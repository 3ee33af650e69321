import type { Variance } from "../plan";

/** The covariance of a fit's coefficients and what inference on any combination of them needs. */
export interface Covariance {
  /** The kind asked for. */
  readonly kind: Variance;
  /** The kind computed: HC1 where HC2 or HC3 is undefined. */
  readonly used: Variance;
  /** p × p, row-major, aligned with the fit's columns. */
  readonly matrix: Float64Array;
  /** Rows whose leverage is 1: the model fits them whatever their outcome. */
  readonly leverageOneRows: readonly number[];
  /** Unweighted residuals, length n. */
  readonly residuals: Float64Array;
  /** Length n; null where the kind does not need them. */
  readonly leverages: Float64Array | null;
  /** Degrees of freedom for a combination (length p): n − p, J − 1, or Satterthwaite's; null where there are none. */
  dfOf(combination: Float64Array): number | null;
  /** Per-cluster pieces, for CR1 and CR2; null otherwise. */
  readonly clustered: Clustered | null;
}

/** What tests and intervals need of a covariance, without the rows it came from. */
export type CoefficientErrors = Pick<Covariance, "kind" | "used" | "matrix" | "dfOf" | "clustered">;

/** Sums over clusters that CR1 and CR2 are made of; all vectors in whitened coordinates (combination c ↦ t = R⁻ᵀ-free t = P'c, P = R⁻¹). */
export interface Clustered {
  readonly count: number;
  /** Adjusted scores (CR2: through A_j), count × p. */
  readonly scores: Float64Array;
  /** For CR2: Θ's pieces for a whitened combination t (length p); null for CR1. */
  readonly satterthwaite: ((t: Float64Array) => { g: Float64Array; m: number; kappa: Float64Array }) | null;
  /** For CR2: signs of the metric in which g_j'·S·g_k is Σ_a metric_a g_ja g_ka; length m. */
  readonly metric: Float64Array | null;
  /** For CR2, weighted: the working variance of a combination, t'N s; identity when unweighted. */
  working(t: Float64Array, s: Float64Array): number;
}
