import type { Reason } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import { count } from "../digits";
import { columnName, listed, rowsName, word } from "../names";

/** Why a contrast has no number: a clause that can stand after "no difference:". */
export function sayReason(reason: Reason, plan: Plan): string {
  const names = (columns: readonly string[]) => listed(columns.map((c) => columnName(c, plan)));
  switch (reason.code) {
    case "no-rows":
      return reason.columns.length > 0
        ? `no ${rowsName(plan)} are complete; cells are missing in ${names(reason.columns)}`
        : `there are no ${rowsName(plan)}`;
    case "too-few-rows":
      return `${count(reason.rows)} ${rowsName(plan)} are too few for ${count(reason.coefficients)} coefficients`;
    case "outcome-constant":
      return `${columnName(plan.outcome.column, plan)} has one value only`;
    case "exposure-constant":
      return `${columnName(plan.exposure.column, plan)} has one value only${reason.value === "" ? "" : ` (${word(reason.value)})`}`;
    case "group-empty":
    case "reference-empty":
      return `no complete ${rowsName(plan)} with ${columnName(plan.exposure.column, plan)} = ${word(reason.level)}`;
    case "told-by-covariates":
      return reason.columns.length > 0
        ? `${names(reason.columns)} alone ${reason.columns.length === 1 ? "tells" : "tell"} ${columnName(plan.exposure.column, plan)}, so nothing is left to compare`
        : `nothing is left of ${columnName(plan.exposure.column, plan)} to compare`;
    case "not-finite":
      return "the numbers are too large or too small to be computed";
  }
}
