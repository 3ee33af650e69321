/** The question as a person states it; the same shape as a plan file. Everything but outcome and exposure has a default. */
export interface Plan {
  /** Path of the CSV, relative to the plan. Not read by the engine. */
  readonly data?: string;
  /** "randomised" lets the text say "effect". Default "observational". */
  readonly design?: "randomised" | "observational";
  readonly outcome: {
    readonly column: string;
    readonly unit?: string;
    readonly label?: string;
    /** Default: binary for two values, else amount. */
    readonly kind?: OutcomeKind;
    readonly form?: "as is" | "log";
  };
  readonly exposure: {
    readonly column: string;
    readonly label?: string;
    readonly unit?: string;
    /** Reference level of a groups exposure. Default: METHODS 2. */
    readonly reference?: string | number;
    /** Unit step of an amount exposure, > 0. Default 1. */
    readonly per?: number;
    readonly kind?: "groups" | "amount";
  };
  readonly covariates?: readonly Covariate[];
  /** Columns in every set, the base set too. */
  readonly always?: readonly string[];
  readonly sets?: SetsChoice;
  /** The reported set. Default: the widest listed. */
  readonly report?: readonly string[];
  /** Columns whose slopes are tested. Default: all covariates of all sets. */
  readonly modifiers?: readonly string[];
  /** A difference, in outcome units (proportion for binary, ratio − 1 for a log outcome), that would matter; > 0. */
  readonly margin?: number | null;
  readonly slopesAlpha?: number;
  readonly reportAt?: Readonly<Record<string, readonly (number | string)[]>>;
  /** "all rows" or the name of one exposure group. */
  readonly average?: string | null;
  readonly cluster?: string | null;
  readonly weights?: string | null;
  /** Default CR2 when a cluster is named, else HC3. */
  readonly variance?: Variance | null;
  /** Confidence level inside (0, 1). Default 0.95. */
  readonly level?: number;
  /** Marks for a missing cell: added to the default ones, or replacing them. */
  readonly missing?: readonly string[] | { readonly only: readonly string[] };
  readonly id?: readonly string[];
  readonly keep?: readonly Keep[];
  /** What one row is, in the plural ("flats"). */
  readonly rowsAre?: string;
  readonly script?: string;
}

export interface Covariate {
  readonly column: string;
  readonly form?: Form;
  readonly timing?: "before" | "after" | "unsure";
  readonly reason?: string;
  readonly label?: string;
  /** Reference level of a category. Default: the first in natural order. */
  readonly reference?: string | number;
}

export type OutcomeKind = "amount" | "binary" | "count";
export type Form = "as is" | "log" | "category" | { readonly polynomial: number } | { readonly spline: number };
export type SetsChoice = "each" | "steps" | "every" | readonly (readonly string[])[];
export type Variance = "classical" | "HC0" | "HC1" | "HC2" | "HC3" | "CR1" | "CR2";

/** One condition a row must meet to take part. */
export type Keep =
  | { readonly column: string; readonly from?: number | string; readonly to?: number | string }
  | { readonly column: string; readonly not: readonly (string | number)[] }
  | { readonly column: string; readonly only: readonly (string | number)[] };
