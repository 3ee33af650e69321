import type { Plan } from "../engine/plan";
import type { Table } from "../engine/table";
import { describeColumns } from "./describe";
import { suggestPlan } from "./suggest";

/** What a person can change in place; everything else stays as the plan has it. */
export type PlanChange =
  | { readonly key: "outcome"; readonly column: string }
  | { readonly key: "exposure"; readonly column: string }
  | { readonly key: "reference"; readonly level: string }
  | { readonly key: "covariates"; readonly columns: readonly string[] }
  | { readonly key: "margin"; readonly value: number | null }
  /** Rows to average over where slopes differ: "all rows", an exposure group, or none. */
  | { readonly key: "average"; readonly over: string | null }
  | { readonly key: "per"; readonly value: number }
  | { readonly key: "sets"; readonly sets: "each" | "steps" | "every" }
  | { readonly key: "report"; readonly columns: readonly string[] };

/**
 * The plan after a choice. What belonged to a column that leaves its role goes with it, so that no column is named twice and no list names
 * a column that is no longer held fixed. Outcome and exposure change places where one takes the other's column; where the table is given
 * and the column that comes back cannot be an outcome, another outcome is suggested instead. The plan itself where nothing changes.
 */
export function applyChange(plan: Plan, change: PlanChange, table?: Table): Plan {
  switch (change.key) {
    case "outcome":
      return changeOutcome(plan, change.column);
    case "exposure":
      return changeExposure(plan, change.column, table);
    case "reference":
      return { ...plan, exposure: { ...plan.exposure, reference: change.level } };
    case "covariates":
      return changeCovariates(plan, change.columns);
    case "margin":
      return { ...plan, margin: change.value };
    case "average":
      return change.over === null ? without(plan, "average") : { ...plan, average: change.over };
    case "per":
      return { ...plan, exposure: { ...plan.exposure, per: change.value } };
    case "sets":
      // a reported set of the old listing need not be among the new ones
      return { ...without(plan, "report"), sets: change.sets };
    case "report":
      return { ...plan, report: change.columns };
  }
}

/** A margin is in the outcome's units and goes with it. */
function changeOutcome(plan: Plan, column: string): Plan {
  if (column === plan.outcome.column) return plan;
  const rest = without(freed(plan, column), "margin");
  const swapped = column === plan.exposure.column;
  return swapped
    ? { ...without(rest, "average"), outcome: { column }, exposure: { column: plan.outcome.column } }
    : { ...rest, outcome: { column } };
}

function changeExposure(plan: Plan, column: string, table?: Table): Plan {
  if (column === plan.exposure.column) return plan;
  const rest = without(freed(plan, column), "average");
  if (column !== plan.outcome.column) return { ...rest, exposure: { column } };
  const outcome = outcomeInstead(plan, column, table);
  return { ...freed(without(rest, "margin"), outcome), outcome: { column: outcome }, exposure: { column } };
}

/** The exposure that gives way, or the table's last amount where a column of words cannot be measured. */
function outcomeInstead(plan: Plan, exposure: string, table?: Table): string {
  const back = plan.exposure.column;
  const roles = table && describeColumns(table).find(({ name }) => name === back);
  if (!table || !roles?.notOutcome) return back;
  const suggested = suggestPlan(table, { exposure });
  return "plan" in suggested ? suggested.plan.outcome.column : back;
}

function changeCovariates(plan: Plan, columns: readonly string[]): Plan {
  const before = plan.covariates ?? [];
  const wanted = [...new Set(columns)];
  const covariates = wanted.map((column) => before.find((covariate) => covariate.column === column) ?? { column });
  const added = wanted.some((column) => !before.some((covariate) => covariate.column === column));
  const left = before.map(({ column }) => column).filter((column) => !wanted.includes(column));
  const next = dropped({ ...plan, covariates }, left);
  // sets listed by hand and the reported one were chosen among the old covariates; a new column must not go unused
  return added ? without(Array.isArray(next.sets) ? without(next, "sets") : next, "report") : next;
}

/** The plan without a column among its covariates and in every list of them. */
function freed(plan: Plan, column: string): Plan {
  const covariates = plan.covariates?.filter((covariate) => covariate.column !== column);
  const rest = dropped(covariates ? { ...plan, covariates } : plan, [column]);
  return rest.weights === column ? without(rest, "weights") : rest;
}

function dropped(plan: Plan, columns: readonly string[]): Plan {
  if (columns.length === 0) return plan;
  const stays = (column: string) => !columns.includes(column);
  let next = plan;
  if (next.always) next = { ...next, always: next.always.filter(stays) };
  if (typeof next.sets === "object") next = { ...next, sets: unique(next.sets.map((set) => set.filter(stays))) };
  if (next.report?.some((column) => !stays(column))) next = without(next, "report");
  // no modifiers left means all covariates again, not none
  const modifiers = next.modifiers?.filter(stays);
  if (modifiers) next = modifiers.length > 0 ? { ...next, modifiers } : without(next, "modifiers");
  if (next.reportAt)
    next = { ...next, reportAt: Object.fromEntries(Object.entries(next.reportAt).filter(([column]) => stays(column))) };
  return next;
}

function unique(sets: readonly (readonly string[])[]): (readonly string[])[] {
  return [...new Map(sets.map((set) => [JSON.stringify(set), set])).values()];
}

function without<K extends keyof Plan>(plan: Plan, key: K): Plan {
  return Object.fromEntries(Object.entries(plan).filter(([name]) => name !== key)) as unknown as Plan;
}
