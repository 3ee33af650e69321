import type { Problem } from "../findings";
import type { Plan } from "../plan";
import type { Column, Table } from "../table";
import { asGroups, distinctValues, findColumn, isAmount } from "./columns";
import { adjustmentColumns, namings } from "./roles";
import { ALL_ROWS } from "../slopes/average";
import { EVERY_LIMIT, listSets, SETS_LIMIT } from "./sets";

/** Groups of an exposure; beyond it nobody reads one contrast a group. */
export const GROUP_LIMIT = 50;
/** Levels of a category covariate. */
export const LEVEL_LIMIT = 200;

/**
 * Everything that makes a question unusable on this table, in the order a person would mend it. Empty: `compare` may be called.
 * Positions and nearest names are added by plan/check.
 */
export function findProblems(table: Table, plan: Plan): Problem[] {
  const unknown = namings(plan).filter((n) => !findColumn(table, n.column));
  if (unknown.length > 0) return unknown.map(({ column, role }) => ({ code: "unknown-column", column, role, nearest: null }));
  return [
    ...repeated(plan),
    ...outcomeProblems(table, plan),
    ...exposureProblems(table, plan),
    ...covariateProblems(table, plan),
    ...keepProblems(table, plan),
    ...otherProblems(table, plan),
  ];
}

function repeated(plan: Plan): Problem[] {
  const roles = new Map<string, string[]>();
  const add = (column: string, role: string) => roles.set(column, [...(roles.get(column) ?? []), role]);
  add(plan.outcome.column, "outcome");
  add(plan.exposure.column, "exposure");
  for (const column of adjustmentColumns(plan)) add(column, "covariate");
  if (plan.weights) add(plan.weights, "weights");
  // Errors clustered by the outcome or by the weights answer no question; by the exposure or a covariate they may.
  if (plan.cluster === plan.outcome.column || (plan.cluster && plan.cluster === plan.weights)) add(plan.cluster, "cluster");
  const problems: Problem[] = [];
  for (const [column, all] of roles) if (all.length > 1) problems.push({ code: "named-twice", column, roles: all });
  const listed = (plan.covariates ?? []).map((c) => c.column);
  for (const column of new Set(listed))
    if (listed.filter((c) => c === column).length > 1)
      problems.push({ code: "named-twice", column, roles: ["covariate", "covariate"] });
  return problems;
}

function outcomeProblems(table: Table, { outcome }: Plan): Problem[] {
  const column = findColumn(table, outcome.column)!;
  if (isAmount(column)) {
    if (outcome.kind !== "binary" || distinctValues(column.values, 2)) return [];
    return [{ code: "too-many-levels", column: column.name, role: "outcome", levels: asGroups(column).levels.length, limit: 2 }];
  }
  const { levels } = asGroups(column);
  if (levels.length === 2 && outcome.form !== "log" && outcome.kind !== "count" && outcome.kind !== "amount") return [];
  return [{ code: "not-numeric", column: column.name, role: "outcome", example: levels[0] ?? "" }];
}

function exposureProblems(table: Table, { exposure, average }: Plan): Problem[] {
  const column = findColumn(table, exposure.column)!;
  if (exposure.kind === "amount" && !isAmount(column))
    return [{ code: "not-numeric", column: column.name, role: "exposure", example: asGroups(column).levels[0] ?? "" }];
  const count = levelCount(column, GROUP_LIMIT);
  const grouped =
    !isAmount(column) || exposure.kind === "groups" || (column.kind === "number" && exposure.kind === undefined && count === 2);
  if (!grouped)
    return average && average !== ALL_ROWS
      ? [{ code: "unknown-level", column: column.name, level: average, levels: [ALL_ROWS] }]
      : [];
  if (count > GROUP_LIMIT)
    return [
      {
        code: "too-many-levels",
        column: column.name,
        role: "exposure",
        levels: asGroups(column).levels.length,
        limit: GROUP_LIMIT,
      },
    ];
  const { levels } = asGroups(column);
  const { reference } = exposure;
  if (reference !== undefined && !levels.includes(String(reference)))
    return [{ code: "unknown-level", column: column.name, level: String(reference), levels: [...levels] }];
  if (average && average !== ALL_ROWS && !levels.includes(average)) {
    return [{ code: "unknown-level", column: column.name, level: average, levels: [ALL_ROWS, ...levels] }];
  }
  return [];
}

function covariateProblems(table: Table, plan: Plan): Problem[] {
  const problems: Problem[] = [];
  for (const name of adjustmentColumns(plan)) {
    const column = findColumn(table, name)!;
    const stated = plan.covariates?.find((c) => c.column === name);
    const form = stated?.form ?? (isAmount(column) ? "as is" : "category");
    if (form !== "category") {
      if (!isAmount(column))
        problems.push({ code: "not-numeric", column: name, role: "covariate", example: asGroups(column).levels[0] ?? "" });
      continue;
    }
    if (levelCount(column, LEVEL_LIMIT) > LEVEL_LIMIT) {
      problems.push({
        code: "too-many-levels",
        column: name,
        role: "covariate",
        levels: asGroups(column).levels.length,
        limit: LEVEL_LIMIT,
      });
    } else if (stated?.reference !== undefined && !asGroups(column).levels.includes(String(stated.reference))) {
      problems.push({
        code: "unknown-level",
        column: name,
        level: String(stated.reference),
        levels: [...asGroups(column).levels],
      });
    }
  }
  return problems;
}

/** Restrictions that could not do what they say: a range of words, a level there is not. */
function keepProblems(table: Table, plan: Plan): Problem[] {
  return (plan.keep ?? []).flatMap((rule): Problem[] => {
    const column = findColumn(table, rule.column)!;
    if (isAmount(column)) return [];
    const { levels } = column;
    if ("from" in rule || "to" in rule)
      return [{ code: "not-numeric", column: column.name, role: "keep", example: levels[0] ?? "" }];
    // `not` may name a level that is gone: there is nothing left to keep out.
    const only = "only" in rule ? rule.only.map(String) : [];
    return only
      .filter((level) => !levels.includes(level))
      .map((level) => ({ code: "unknown-level", column: column.name, level, levels: [...levels] }));
  });
}

function otherProblems(table: Table, plan: Plan): Problem[] {
  const problems: Problem[] = [];
  const { variance, cluster, weights } = plan;
  if ((variance === "CR1" || variance === "CR2") && !cluster) problems.push({ code: "cluster-needed", variance });
  if (weights) {
    const column = findColumn(table, weights)!;
    if (!isAmount(column))
      problems.push({ code: "not-numeric", column: weights, role: "weights", example: asGroups(column).levels[0] ?? "" });
    else {
      const at = column.values.findIndex((w) => w < 0);
      if (at >= 0) problems.push({ code: "negative-weight", column: weights, line: table.lines[at] });
    }
  }
  const free = (plan.covariates ?? []).filter((c) => !plan.always?.includes(c.column)).length;
  if (plan.sets === "every" && free > EVERY_LIMIT)
    return [...problems, { code: "too-many-sets", sets: 2 ** free, limit: SETS_LIMIT }];
  const sets = listSets(plan);
  if (sets.length > SETS_LIMIT) problems.push({ code: "too-many-sets", sets: sets.length, limit: SETS_LIMIT });
  if (plan.report) {
    const wanted = new Set([...(plan.always ?? []), ...plan.report]);
    if (!sets.some((s) => s.length === wanted.size && s.every((c) => wanted.has(c))))
      problems.push({ code: "unknown-set", columns: [...plan.report] });
  }
  return problems;
}

function levelCount(column: Column, limit: number): number {
  if (isAmount(column)) return distinctValues(column.values, limit)?.length ?? limit + 1;
  return column.levels.length;
}
