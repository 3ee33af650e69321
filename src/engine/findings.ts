/**
 * What the data or a model brought to light, as coded facts. English for every code stands in report/wording and nowhere else.
 * A finding never stops a comparison; a Problem (below) does; a Reason says why one contrast has no number.
 */
export type Finding =
  // — reading —
  | { code: "duplicate-header"; column: string; original: string }
  | { code: "empty-header"; column: string }
  /** Cells that are no number, or no date where the column is one of `dates`. */
  | { code: "unreadable-cells"; column: string; lines: number[]; examples: string[]; dates?: true }
  | { code: "beyond-double-range"; column: string; lines: number[] }
  | { code: "short-rows"; lines: number[] }
  | { code: "long-rows"; lines: number[] }
  | { code: "blank-lines"; lines: number[] }
  | { code: "thousands-marks"; column: string }
  | { code: "decimal-comma" }
  // — the question —
  | { code: "two-valued-outcome"; yes: string; no: string }
  | { code: "count-as-amount" }
  | { code: "clusters-ignored"; cluster: string }
  | { code: "classical-weights"; weights: string }
  | { code: "classical-binary" }
  | { code: "log-not-positive"; column: string; lines: number[] }
  | { code: "no-modifier" }
  | { code: "small-group"; level: string; rows: number }
  | { code: "kept-rows"; rows: number; columns: string[] }
  | { code: "after-exposure"; columns: string[] }
  // — fitting; `set` is an index into Comparison.sets —
  | { code: "exact-fit"; set: number }
  | { code: "leverage-one"; set: number; lines: number[]; fallback: "HC1" | null }
  | { code: "standard-error-missing"; set: number; why: "no-residual-df" | "one-cluster" | "not-finite" }
  /** `part`: other design columns of the covariate (levels, powers, knots) stay in the fit. */
  | { code: "set-aside"; set: number; column: string; combinationOf: string[]; part?: true }
  | { code: "base-varies" }
  // — slopes —
  | { code: "no-shared-range"; set: number; modifier: string }
  | { code: "interaction-not-estimable"; set: number; modifier: string };

/** Why a contrast of a set has no number at all. */
export type Reason =
  | { code: "no-rows"; columns: string[] }
  | { code: "too-few-rows"; rows: number; coefficients: number }
  | { code: "outcome-constant" }
  | { code: "exposure-constant"; value: string }
  | { code: "group-empty"; level: string }
  | { code: "told-by-covariates"; columns: string[] }
  | { code: "reference-empty"; level: string }
  | { code: "not-finite" };

/** Input that cannot be used. The command line exits 2 on it; the panel shows its sentence. */
export type Problem = {
  /** File the sentence names: the CSV or the plan. */
  readonly file?: string;
  /** 1-based line in that file. */
  readonly line?: number;
  /** 1-based character column in that file (plans), for editors. */
  readonly character?: number;
} & (
  | { code: "file-missing" }
  | { code: "file-unreadable"; detail: string }
  | { code: "file-empty" }
  /** `setAside`: rows there are, but all of them longer than the header. */
  | { code: "no-data-rows"; setAside?: number }
  | { code: "bad-encoding" }
  | { code: "open-quote" }
  | { code: "stray-quote" }
  | { code: "too-many-columns"; columns: number; limit: number }
  | { code: "too-large"; bytes: number; limit: number }
  | { code: "one-column" }
  // plan
  | { code: "bad-json"; detail: string }
  | { code: "unknown-key"; key: string; nearest: string | null }
  | { code: "bad-value"; key: string; expected: string; found: string }
  | { code: "missing-key"; key: string }
  | { code: "outside-folder"; path: string }
  // plan against table
  | { code: "unknown-column"; column: string; role: string; nearest: string | null }
  | { code: "unknown-level"; column: string; level: string; levels: string[] }
  | { code: "named-twice"; column: string; roles: string[] }
  | { code: "not-numeric"; column: string; role: string; example: string }
  | { code: "too-many-levels"; column: string; role: string; levels: number; limit: number }
  | { code: "negative-weight"; column: string }
  | { code: "cluster-needed"; variance: string }
  | { code: "unknown-set"; columns: string[] }
  | { code: "too-many-sets"; sets: number; limit: number }
  | { code: "no-outcome" }
  | { code: "no-exposure" }
);
