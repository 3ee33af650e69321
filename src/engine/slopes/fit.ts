import type { ContrastColumn, Design } from "../design/types";
import { addedErrors } from "../errors/added";
import { covariance } from "../errors/covariance";
import type { Scratch } from "../errors/covariance";
import { quadratic } from "../errors/quadratic";
import { fitColumns } from "../linear/fit";
import type { Fit } from "../linear/types";
import { tCritical } from "../probability";
import type { InteractionFit, SlopesInput } from "./types";

/** A combination of coefficients with its error. `standardError` and `df` are null where they cannot be computed. */
export interface Combined {
  readonly estimate: number;
  readonly standardError: number | null;
  readonly df: number | null;
}

/**
 * The set, one modifier and the exposure's products with it, for testing: errors for the products alone, carried on from the set's own fit
 * where the kind of errors allows.
 */
export function fitTrial(input: SlopesInput, modifier: string): InteractionFit {
  const { design, factor, set, start, variance } = input;
  const extra = set.includes(modifier) ? [] : design.covariates.get(modifier)!.columns;
  const products = design.interactions.get(modifier)!.columns.flat();
  const fit = fitColumns(factor, [0, ...columnsOf(design, set), ...exposureColumns(design), ...extra, ...products]);
  const modifiers = [modifier];
  if (!hasErrors(input, fit)) return { fit, cov: null, modifiers };
  const from = fit.columns.findIndex((c) => products.includes(c));
  const added = start && addedErrors(design.frame, start, fit, variance, from);
  if (added) return { fit, cov: added, modifiers };
  return { fit, cov: from >= 0 ? covariance(design.frame, fit, variance, from, scratchFor(design)) : null, modifiers };
}

/** The set, the modifiers and the exposure's products with them, for readouts: errors for the exposure's columns and the products. */
export function fitInteraction(input: SlopesInput, modifiers: readonly string[]): InteractionFit {
  const { design, factor, set, variance } = input;
  const products = modifiers.flatMap((name) => design.interactions.get(name)!.columns.flat());
  const exposure = exposureColumns(design);
  const fit = fitColumns(factor, [0, ...columnsOf(design, [...new Set([...set, ...modifiers])]), ...exposure, ...products]);
  const from = fit.columns.findIndex((c) => exposure.includes(c) || products.includes(c));
  const cov = hasErrors(input, fit) && from >= 0 ? covariance(design.frame, fit, variance, from, scratchFor(design)) : null;
  return { fit, cov, modifiers };
}

function hasErrors({ design, variance }: SlopesInput, fit: Fit): boolean {
  return fit.residualDf > 0 && (!variance.startsWith("CR") || design.frame.clusters!.count > 1);
}

function columnsOf(design: Design, names: readonly string[]): number[] {
  return names.flatMap((name) => design.covariates.get(name)!.columns);
}

function exposureColumns(design: Design): number[] {
  return design.contrasts.map((c) => c.column).filter((c) => c >= 0);
}

const scratches = new WeakMap<Design, Scratch>();

/** Only the covariance matrix of an interaction fit is ever read, so all of a design's share their row buffers. */
function scratchFor(design: Design): Scratch {
  let scratch = scratches.get(design);
  if (!scratch) scratches.set(design, (scratch = { e: new Float64Array(design.frame.n), h: new Float64Array(design.frame.n) }));
  return scratch;
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
