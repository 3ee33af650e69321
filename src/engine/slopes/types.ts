import type { SlopesTest, VariesReadout } from "../comparison";
import type { Design } from "../design/types";
import type { CoefficientErrors } from "../errors/types";
import type { Finding } from "../findings";
import type { Factor, Fit } from "../linear/types";
import type { Passing } from "../passes/types";
import type { Plan, Variance } from "../plan";

/** What the slopes stage needs to know of the question. */
export interface SlopesQuestion {
  readonly design: Design;
  readonly factor: Factor;
  readonly modifiers: readonly string[];
  readonly variance: Variance;
  readonly level: number;
  readonly alpha: number;
  readonly margin: number | null;
  readonly reportAt: Plan["reportAt"];
  readonly outcomeForm: "as is" | "log";
  /** Rows to average over where slopes differ: "all rows", a group, or null. */
  readonly average: string | null;
  readonly passing: Passing;
}

/** One set of covariates whose slopes are asked for. */
export interface SlopesSet {
  readonly columns: readonly string[];
  /** Position in the comparison, for findings. */
  readonly index: number;
  /** False where no contrast has a number: nothing is tested then. */
  readonly estimable: boolean;
}

/** Whether a set has one effect, and what there is instead where it has not. */
export interface SlopesOutcome {
  readonly tests: readonly SlopesTest[];
  readonly kind: "single" | "undecided" | "varies";
  readonly differing: readonly string[];
  /** Aligned with design.contrasts (null for a contrast without rows); null unless `kind` is "varies". */
  readonly varies: { readonly perContrast: readonly (VariesReadout | null)[]; readonly joint: InteractionFit } | null;
  readonly findings: readonly Finding[];
}

/** A fit that holds the set, some modifiers and their products with the exposure. */
export interface InteractionFit {
  readonly fit: Fit;
  /** Null where the fit has no residual degrees of freedom; filled from the exposure's columns on, or for the products alone. */
  readonly cov: CoefficientErrors | null;
  readonly modifiers: readonly string[];
}
