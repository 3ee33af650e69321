import type { AverageOverRows } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { combine, intervalOf } from "./fit";
import type { InteractionFit } from "./types";

/** What a plan writes for the average over all common rows. */
export const ALL_ROWS = "all rows";

/**
 * The mean of a contrast over stated rows: the difference at each row's own values of the differing modifiers, averaged over all common rows or
 * one exposure group's. Its error takes those rows as given. Given only when asked for, and never called the effect (METHODS 5).
 * Null where a coefficient it needs could not be estimated, or the group has no rows.
 * @param over "all rows" or the name of an exposure group
 */
export function averageOver(
  design: Design,
  interaction: InteractionFit,
  contrast: ContrastColumn,
  over: string,
  level: number,
): AverageOverRows | null {
  const { fit, modifiers } = interaction;
  const group = over === ALL_ROWS ? -1 : (design.group?.levels.indexOf(over) ?? -1);
  const takes = (row: number) => group < 0 || design.group!.codes[row] === group;
  const g = design.exposure.columns.indexOf(contrast.column);
  const combination = new Float64Array(fit.columns.length);
  const place = (column: number, share: number): boolean => {
    const at = fit.columns.indexOf(column);
    if (at >= 0) combination[at] += share * contrast.factor;
    return at >= 0 || share === 0;
  };
  let rows = 0;
  for (let i = 0; i < design.frame.n; i++) if (takes(i)) rows++;
  if (rows === 0 || !place(contrast.column, 1)) return null;
  for (const name of modifiers) {
    const own = design.covariates.get(name)!.columns;
    const products = design.interactions.get(name)!.columns[g];
    const complete = own.every((column, k) => {
      let sum = 0;
      for (let i = 0; i < design.frame.n; i++) if (takes(i)) sum += design.frame.columns[column][i];
      return place(products[k], sum / rows);
    });
    if (!complete) return null;
  }
  const combined = combine(interaction, combination);
  return {
    over,
    rows,
    estimate: combined.estimate,
    standardError: combined.standardError,
    interval: intervalOf(combined, level),
  };
}
