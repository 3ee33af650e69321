import type { ContrastColumn, Design } from "../design/types";
import { manyErrors } from "../errors/many";
import { quadratic } from "../errors/quadratic";
import { fitColumns } from "../linear/fit";
import type { CoefficientErrors } from "../errors/types";
import type { Fit } from "../linear/types";
import type { Variance } from "../plan";
import { tCritical } from "../probability";
import type { InteractionFit, SlopesQuestion } from "./types";

/** A combination of coefficients with its error. `standardError` and `df` are null where they cannot be computed. */
export interface Combined {
  readonly estimate: number;
  readonly standardError: number | null;
  readonly df: number | null;
}

/** The set, one modifier and the exposure's products with it, for testing: without errors yet. */
export function solveTrial({ design, factor }: SlopesQuestion, set: readonly string[], modifier: string): Fit {
  const extra = set.includes(modifier) ? [] : design.covariates.get(modifier)!.columns;
  return fitColumns(factor, [
    0,
    ...columnsOf(design, set),
    ...exposureColumns(design),
    ...extra,
    ...productsOf(design, [modifier]),
  ]);
}

/** The set, some modifiers and the exposure's products with them, for what is read out or drawn: without errors yet. */
export function solveJoint(
  { design, factor }: Pick<SlopesQuestion, "design" | "factor">,
  set: readonly string[],
  modifiers: readonly string[],
): Fit {
  const covariates = columnsOf(design, [...new Set([...set, ...modifiers])]);
  return fitColumns(factor, [0, ...covariates, ...exposureColumns(design), ...productsOf(design, modifiers)]);
}

/** Whether a fit has what errors need: residual degrees of freedom, and more than one cluster where errors go by cluster. */
export function hasErrors(design: Design, variance: Variance, fit: Fit): boolean {
  return fit.residualDf > 0 && (!variance.startsWith("CR") || design.frame.clusters!.count > 1);
}

/** A set, some modifiers and the exposure's products with them, for readouts: errors for the exposure's columns and the products. */
export function fitInteractions(
  question: SlopesQuestion,
  sets: readonly (readonly string[])[],
  modifiers: readonly string[],
): InteractionFit[] {
  const { design } = question;
  const targets = [...exposureColumns(design), ...productsOf(design, modifiers)];
  const fits = sets.map((set) => solveJoint(question, set, modifiers));
  return errorsFor(question, fits, targets).map((cov, i) => ({ fit: fits[i], cov, modifiers }));
}

/** Errors of the targets in each fit; null where a fit has none of them, or no residual degrees of freedom, or one cluster. */
export function errorsFor(
  { design, factor, variance, passing }: SlopesQuestion,
  fits: readonly Fit[],
  targets: readonly number[],
): (CoefficientErrors | null)[] {
  const able = fits.filter((fit) => hasErrors(design, variance, fit));
  const errors = manyErrors(design.frame, factor, able, targets, variance, passing);
  const byFit = new Map(able.map((fit, i) => [fit, errors[i]]));
  return fits.map((fit) => byFit.get(fit) ?? null);
}

export function productsOf(design: Design, modifiers: readonly string[]): number[] {
  return modifiers.flatMap((name) => design.interactions.get(name)!.columns.flat());
}

function columnsOf(design: Design, names: readonly string[]): number[] {
  return names.flatMap((name) => design.covariates.get(name)!.columns);
}

function exposureColumns(design: Design): number[] {
  return design.contrasts.map((c) => c.column).filter((c) => c >= 0);
}

/**
 * The combination of coefficients that is a contrast at given values of the modifiers, per the contrast's printing factor; null where a
 * coefficient it needs could not be estimated.
 */
export function contrastAt(
  design: Design,
  { fit, modifiers }: InteractionFit,
  contrast: ContrastColumn,
  values: ReadonlyMap<string, number | string>,
): Float64Array | null {
  const g = design.exposure.columns.indexOf(contrast.column);
  const combination = new Float64Array(fit.columns.length);
  const place = (column: number, share: number): boolean => {
    if (share === 0) return true;
    const at = fit.columns.indexOf(column);
    if (at < 0) return false;
    combination[at] += share * contrast.factor;
    return true;
  };
  if (!place(contrast.column, 1)) return null;
  for (const name of modifiers) {
    const basis = design.covariates.get(name)!.basis.at(values.get(name)!);
    const line = design.interactions.get(name)!.columns[g];
    if (!line.every((column, k) => place(column, basis[k]))) return null;
  }
  return combination;
}

/** Estimate, error and degrees of freedom of a combination. An exact fit has error 0. */
export function combine({ fit, cov }: InteractionFit, combination: Float64Array): Combined {
  let estimate = 0;
  for (let i = 0; i < combination.length; i++) estimate += combination[i] * fit.coefficients[i];
  if (fit.residualSumOfSquares === 0 && fit.residualDf > 0) return { estimate, standardError: 0, df: fit.residualDf };
  if (!cov) return { estimate, standardError: null, df: null };
  const variance = quadratic(cov.matrix, combination, combination);
  const df = cov.dfOf(combination);
  const standardError = variance >= 0 && Number.isFinite(variance) && df !== null ? Math.sqrt(variance) : null;
  return { estimate, standardError, df: standardError === null ? null : df };
}

/** Two-sided interval on t; null where the error is. */
export function intervalOf({ estimate, standardError, df }: Combined, level: number): [number, number] | null {
  if (standardError === null || df === null) return null;
  const half = standardError === 0 ? 0 : tCritical(level, df) * standardError;
  return [estimate - half, estimate + half];
}
