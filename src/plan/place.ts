import type { Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import { namings } from "../engine/question/roles";

export type Path = readonly (string | number)[];

/** Roles that put a column into a model; one column may have one of them. */
const IN_MODELS = new Set(["outcome", "exposure", "covariate", "always", "set", "modifier", "weights"]);

/** The place in a plan that a problem found against the table is about; null where the plan does not say it (options may have). */
export function placeOf(problem: Problem, plan: Plan, occurrence = 0): Path | null {
  const named = (column: string, role?: string) =>
    namings(plan).filter((each) => each.column === column && (!role || each.role === role));
  switch (problem.code) {
    case "unknown-column":
      return named(problem.column, problem.role)[occurrence]?.path ?? null;
    case "named-twice": {
      const all = named(problem.column).filter(({ role }) => IN_MODELS.has(role));
      return (all[1] ?? all[0])?.path ?? null;
    }
    case "unknown-level":
      return referencePath(plan, problem.column, problem.level);
    case "not-numeric":
      return reasonPath(plan, problem.column, problem.role) ?? named(problem.column)[0]?.path ?? null;
    case "too-many-levels":
      return named(problem.column)[0]?.path ?? null;
    case "negative-weight":
      return plan.weights === problem.column ? ["weights"] : null;
    case "cluster-needed":
      return plan.variance === problem.variance ? ["variance"] : null;
    case "unknown-set":
      return plan.report && sameList(plan.report, problem.columns) ? ["report"] : null;
    case "too-many-sets":
      return plan.sets === undefined ? ["covariates"] : ["sets"];
    // about the file or the text of the plan, which carry their own places
    case "file-missing":
    case "file-unreadable":
    case "file-empty":
    case "no-data-rows":
    case "bad-encoding":
    case "open-quote":
    case "stray-quote":
    case "too-many-columns":
    case "too-large":
    case "one-column":
    case "bad-json":
    case "unknown-key":
    case "bad-value":
    case "missing-key":
    case "outside-folder":
    case "no-outcome":
    case "no-exposure":
      return null;
  }
}

function referencePath({ exposure, covariates = [] }: Plan, column: string, level: string): Path | null {
  if (exposure.column === column && String(exposure.reference) === level) return ["exposure", "reference"];
  const at = covariates.findIndex((covariate) => covariate.column === column && String(covariate.reference) === level);
  return at < 0 ? null : ["covariates", at, "reference"];
}

/** What asks for numbers, where something in the plan does; the column by itself otherwise. */
function reasonPath({ outcome, exposure, covariates = [], weights }: Plan, column: string, role: string): Path | null {
  if (role === "weights") return weights === column ? ["weights"] : null;
  if (role === "outcome") return outcome.column === column ? ["outcome", "column"] : null;
  if (role === "exposure") return exposure.column === column ? ["exposure", exposure.kind ? "kind" : "column"] : null;
  const at = covariates.findIndex((covariate) => covariate.column === column);
  return at < 0 ? null : ["covariates", at, covariates[at].form ? "form" : "column"];
}

function sameList(a: readonly string[], b: readonly string[]): boolean {
  return a.length === b.length && a.every((item, i) => item === b[i]);
}
