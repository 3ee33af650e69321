/**
 * A pass over the rows for many models at once. The models share their last columns (targets); the columns before them form paths, and models
 * whose paths begin alike share the work of that beginning: include/exclude trees of every adjustment set, lists, single covariates.
 * Plain data, so that it can be sent to another thread.
 */
export interface Program {
  /** Frame columns that are read, the targets last. */
  readonly columns: readonly number[];
  /** By column and last the outcome: what the row values are divided by. */
  readonly scale: Float64Array;
  /** Number of targets, q. */
  readonly targets: number;
  readonly models: number;
  /** Longest path. */
  readonly depth: number;
  /** In depth-first order, each after its parent. */
  readonly nodes: readonly Node[];
}

/** One column taken out of those that follow it. Slots are positions in `columns`; the outcome's slot is `columns.length`. */
export interface Node {
  /** Columns taken out so far, this one included. */
  readonly depth: number;
  /** Slot of the column taken. */
  readonly take: number;
  /** 1/‖what is left of it‖². */
  readonly inverse: number;
  /** Slots that later nodes or the finish read (targets and outcome included), with the multiple of the taken column that leaves each. */
  readonly slots: Int32Array;
  readonly shares: Float64Array;
  readonly leaf: boolean;
  /** The model that ends here, or null. */
  readonly finish: Finish | null;
}

/** The targets taken out one after another, after a model's path. */
export interface Finish {
  readonly model: number;
  /** Length q: 1/‖what is left of target a‖². */
  readonly inverse: Float64Array;
  /** q × (q + 1): multiple of target a taken from target b > a, and (last) from the outcome. */
  readonly shares: Float64Array;
  /** q × q, upper: coefficient a's influence is Σ_c weight[a·q + c]·(what is left of target c)·e/(1 − h), in the frame's units. */
  readonly weights: Float64Array;
}

/** The rows a program runs over, in the order of its columns. */
export interface RowSource {
  readonly n: number;
  /** Aligned with `Program.columns`, the outcome last. */
  readonly columns: readonly Float64Array[];
  readonly weights: Float64Array | null;
  /** The base fit's influences on each target, length n each; null where no shift is asked for. */
  readonly base: readonly Float64Array[] | null;
}

/** A walk over a stretch of rows. */
export interface WalkTask {
  readonly kind: "walk";
  readonly program: Program;
  readonly source: RowSource;
  readonly meat: Meat;
  readonly from: number;
  readonly to: number;
}

/** Sums over rows, by model. */
export interface Sums {
  /** models × q(q + 1)/2: Σ of products of the left-over targets times the squared residual as the error kind takes it. */
  readonly meat: Float64Array;
  /** models × q: Σ (influence − base influence)²; zero where no shift is asked for. */
  readonly shift: Float64Array;
  /** By model: the smallest 1 − h, less 1. */
  readonly gap: Float64Array;
}

/** What a row's squared residual is divided by: nothing, 1 − h, or its square. */
export type Meat = "HC0" | "HC2" | "HC3";
