import type { Plan } from "../plan";

/** Every place of the plan that names a column, with the role's word and the path to it. */
export interface Naming {
  readonly column: string;
  readonly role:
    | "outcome"
    | "exposure"
    | "covariate"
    | "always"
    | "set"
    | "report"
    | "modifier"
    | "cluster"
    | "weights"
    | "keep"
    | "id"
    | "reportAt";
  readonly path: readonly (string | number)[];
}

export function namings(plan: Plan): Naming[] {
  const list: Naming[] = [
    { column: plan.outcome.column, role: "outcome", path: ["outcome", "column"] },
    { column: plan.exposure.column, role: "exposure", path: ["exposure", "column"] },
  ];
  (plan.covariates ?? []).forEach((c, i) =>
    list.push({ column: c.column, role: "covariate", path: ["covariates", i, "column"] }),
  );
  (plan.always ?? []).forEach((column, i) => list.push({ column, role: "always", path: ["always", i] }));
  if (Array.isArray(plan.sets)) {
    (plan.sets as readonly (readonly string[])[]).forEach((set, s) =>
      set.forEach((column, i) => list.push({ column, role: "set", path: ["sets", s, i] })),
    );
  }
  (plan.report ?? []).forEach((column, i) => list.push({ column, role: "report", path: ["report", i] }));
  (plan.modifiers ?? []).forEach((column, i) => list.push({ column, role: "modifier", path: ["modifiers", i] }));
  if (plan.cluster) list.push({ column: plan.cluster, role: "cluster", path: ["cluster"] });
  if (plan.weights) list.push({ column: plan.weights, role: "weights", path: ["weights"] });
  (plan.keep ?? []).forEach((k, i) => list.push({ column: k.column, role: "keep", path: ["keep", i, "column"] }));
  (plan.id ?? []).forEach((column, i) => list.push({ column, role: "id", path: ["id", i] }));
  for (const column of Object.keys(plan.reportAt ?? {})) list.push({ column, role: "reportAt", path: ["reportAt", column] });
  return list;
}

/** Columns that stand in a model beside the exposure and the outcome: covariates, always, sets, modifiers. */
export function adjustmentColumns(plan: Plan): string[] {
  const roles = new Set(["covariate", "always", "set", "modifier"]);
  return [
    ...new Set(
      namings(plan)
        .filter((n) => roles.has(n.role))
        .map((n) => n.column),
    ),
  ];
}
