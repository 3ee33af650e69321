import type { Estimate } from "../comparison";
import type { Design } from "../design/types";
import { fitColumns } from "../linear/fit";
import { residuals } from "../linear/rows";
import type { Factor, Fit, Frame } from "../linear/types";
import { drawnRows } from "./rows";
import type { AddedFigure } from "./types";

/**
 * The added-variable plot of an amount: what is left of outcome and amount after the set's columns, with the line of the set's own estimate.
 * Null where nothing is left of the amount.
 * @param estimate the set's, per the question's step
 * @param lines file line of each common row
 */
export function addedFigure(
  design: Design,
  factor: Factor,
  set: readonly string[],
  per: number,
  estimate: Estimate,
  lines: ArrayLike<number>,
): AddedFigure | null {
  const { frame, contrasts } = design;
  const [{ column, factor: scaling }] = contrasts;
  const others = [0, ...set.flatMap((name) => design.covariates.get(name)!.columns)];
  const y = residuals(frame, fitColumns(factor, others));
  // a step is `scaling` of the column's own units
  const unit = per / scaling;
  const x = columnResiduals(frame, fitColumns(factor, others, column), column).map((value) => value * unit);
  const range = endsOf(x);
  if (!(range[0] < range[1]) || !y.every(Number.isFinite) || !range.every(Number.isFinite)) return null;
  const { interval } = estimate;
  return {
    points: drawnRows({ x, y, lines, group: null }),
    range,
    slope: estimate.estimate / per,
    interval: interval && [interval[0] / per, interval[1] / per],
  };
}

function columnResiduals(frame: Frame, fit: Fit, column: number): Float64Array {
  return residuals({ ...frame, outcome: frame.columns[column] }, fit);
}

function endsOf(values: Float64Array): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (const value of values) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return [low, high];
}
