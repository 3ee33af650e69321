import type { Plan } from "../engine/plan";
import type { PlanChange } from "../protocol";

/** The plan after a choice in the panel. What belonged to a column that leaves its role goes with it, so that no column is named twice. */
export function choose(plan: Plan, change: PlanChange): Plan {
  switch (change.key) {
    case "outcome":
      return chooseOutcome(plan, change.column);
    case "exposure":
      return chooseExposure(plan, change.column);
    case "reference":
      return { ...plan, exposure: { ...plan.exposure, reference: change.level } };
    case "covariates":
      return chooseCovariates(plan, change.columns);
    case "margin":
      return { ...plan, margin: change.value };
    case "per":
      return { ...plan, exposure: { ...plan.exposure, per: change.value } };
    case "sets":
      return { ...without(plan, "report"), sets: change.sets };
    case "report":
      return { ...plan, report: change.columns };
  }
}

/** True where the change answers what a guess had answered before: which columns the question is about. */
export function settlesGuess(change: PlanChange): boolean {
  return change.key === "outcome" || change.key === "exposure" || change.key === "covariates";
}

/** A margin is in the outcome's units, so it goes with the outcome. */
function chooseOutcome(plan: Plan, column: string): Plan {
  if (column === plan.outcome.column) return plan;
  const swapped = column === plan.exposure.column ? chooseExposure(plan, plan.outcome.column) : freed(plan, column);
  return { ...without(swapped, "margin"), outcome: { column } };
}

function chooseExposure(plan: Plan, column: string): Plan {
  if (column === plan.exposure.column) return plan;
  const rest = without(freed(plan, column), "average");
  const outcome = column === plan.outcome.column ? { column: plan.exposure.column } : plan.outcome;
  return { ...(outcome === plan.outcome ? rest : without(rest, "margin")), outcome, exposure: { column } };
}

function chooseCovariates(plan: Plan, columns: readonly string[]): Plan {
  const before = plan.covariates ?? [];
  const covariates = columns.map((column) => before.find((covariate) => covariate.column === column) ?? { column });
  const wanted = { ...plan, covariates };
  const added = columns.some((column) => !before.some((covariate) => covariate.column === column));
  const left = before.map((covariate) => covariate.column).filter((column) => !columns.includes(column));
  const lists = typeof plan.sets === "object";
  // hand-listed sets and the reported one were chosen among the old covariates; a new column must not go unused
  return added
    ? without(lists ? without(dropped(wanted, left), "sets") : dropped(wanted, left), "report")
    : dropped(wanted, left);
}

/** The plan without a column among its covariates and everything that lists them. */
function freed(plan: Plan, column: string): Plan {
  const covariates = plan.covariates?.filter((covariate) => covariate.column !== column);
  return dropped(covariates ? { ...plan, covariates } : plan, [column]);
}

function dropped(plan: Plan, columns: readonly string[]): Plan {
  if (!columns.length) return plan;
  const keep = (column: string) => !columns.includes(column);
  let next = plan;
  if (plan.always) next = { ...next, always: plan.always.filter(keep) };
  if (typeof plan.sets === "object") next = { ...next, sets: plan.sets.map((set) => set.filter(keep)) };
  if (plan.report?.some((column) => !keep(column))) next = without(next, "report");
  const modifiers = plan.modifiers?.filter(keep);
  if (modifiers) next = modifiers.length ? { ...next, modifiers } : without(next, "modifiers");
  if (plan.reportAt)
    next = { ...next, reportAt: Object.fromEntries(Object.entries(plan.reportAt).filter(([column]) => keep(column))) };
  return next;
}

function without<K extends keyof Plan>(plan: Plan, key: K): Plan {
  return Object.fromEntries(Object.entries(plan).filter(([name]) => name !== key)) as unknown as Plan;
}
