import { buildDesign } from "../design/build";
import { factorise } from "../linear/factorise";
import type { Resolved } from "../question/resolve";
import { solveSet } from "./set";

/**
 * Each contrast's estimate on a set's own rows (METHODS 1), null where it has none: what the common rows' estimate is less this is due to the
 * rows alone.
 */
export function ownEstimates(resolved: Resolved, rows: Int32Array, set: readonly string[]): (number | null)[] {
  const design = buildDesign(resolved, rows, set, []);
  const { fit, reasons } = solveSet(design, factorise(design.frame), set, "classical", "first look");
  return design.contrasts.map(({ column, factor }, i) =>
    reasons[i] ? null : fit.coefficients[fit.columns.indexOf(column)] * factor,
  );
}
