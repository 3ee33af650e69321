import { wald } from "../errors/wald";
import { stopIf } from "../cancelled";
import type { Fit } from "../linear/types";
import { changesOf } from "./change";
import type { Changes } from "./change";
import { errorsFor, productsOf, solveTrial } from "./fit";
import type { InteractionFit, SlopesQuestion, SlopesSet } from "./types";

/** Changes below this share of the outcome's spread are rounding, where a fit is exact. */
const EXACT_CHANGE = 1e-9;

/** One modifier tested in one set. */
export interface Trial {
  readonly modifier: string;
  readonly test: { statistic: number; df: [number, number]; p: number } | null;
  readonly changes: Changes;
  /** The fit is exact and the slopes differ in it: no p value, but no doubt either. */
  readonly exactly: boolean;
  /** False where no interaction column could be estimated. */
  readonly estimable: boolean;
}

/**
 * One modifier in every set. Sets that differ in the modifier alone share a model, and all models one pass over the rows.
 * @returns aligned with `sets`
 */
export function trialsOf(question: SlopesQuestion, sets: readonly SlopesSet[], modifier: string): Trial[] {
  const { design, passing } = question;
  const shared = new Map<string, Fit>();
  const fits = sets.map(({ columns }): Fit => {
    const key = JSON.stringify([...new Set([...columns, modifier])].sort());
    const known = shared.get(key);
    if (known) return known;
    stopIf(passing.cancelled);
    const fit = solveTrial(question, columns, modifier);
    // what a dependence sets aside hangs on the order of the columns, which differs between the two
    if (fit.setAside.length === 0) shared.set(key, fit);
    return fit;
  });
  const distinct = [...new Set(fits)];
  const errors = errorsFor(question, distinct, productsOf(design, [modifier]));
  const trials = new Map(
    distinct.map((fit, i) => [fit, tryModifier(question, modifier, { fit, cov: errors[i], modifiers: [modifier] })]),
  );
  return fits.map((fit) => trials.get(fit)!);
}

function tryModifier({ design }: SlopesQuestion, modifier: string, interaction: InteractionFit): Trial {
  const { fit, cov } = interaction;
  const changes = changesOf(design, interaction, modifier);
  const exact = fit.residualSumOfSquares === 0;
  const products = productsOf(design, [modifier]);
  const at = fit.columns.flatMap((column, i) => (products.includes(column) ? [i] : []));
  const unit = (i: number) => Float64Array.from(fit.columns, (_, k) => (k === i ? 1 : 0));
  const test = cov && !exact && at.length > 0 ? wald(design.frame, fit, cov, at.map(unit)) : null;
  const exactly =
    exact &&
    fit.residualDf > 0 &&
    changes.largest !== null &&
    Math.abs(changes.largest.estimate) > EXACT_CHANGE * spread(design.frame.outcome);
  return { modifier, test, changes, exactly, estimable: at.length > 0 };
}

function spread(values: Float64Array): number {
  let largest = 0;
  for (const value of values) largest = Math.max(largest, Math.abs(value));
  return largest;
}
