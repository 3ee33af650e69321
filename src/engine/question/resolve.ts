import type { Question } from "../comparison";
import type { Finding } from "../findings";
import type { Covariate, Form, OutcomeKind, Plan, Variance } from "../plan";
import type { Table } from "../table";
import { asGroups, distinctValues, findColumn, isAmount, isGroupsByNature } from "./columns";
import type { Groups } from "./columns";
import { naturalCompare } from "./natural";
import { adjustmentColumns } from "./roles";
import { listSets, reportedSet } from "./sets";

/** A covariate or modifier as it enters the models. */
export type Source =
  | { readonly kind: "amount"; readonly column: string; readonly form: Exclude<Form, "category">; readonly values: Float64Array }
  | { readonly kind: "category"; readonly column: string; readonly groups: Groups; readonly reference: string | null };

export type Exposure =
  | { readonly kind: "groups"; readonly column: string; readonly groups: Groups; readonly reference: string }
  | { readonly kind: "amount"; readonly column: string; readonly values: Float64Array; readonly per: number };

/** A plan with every default settled on one table: what the later stages work on. */
export interface Resolved {
  readonly question: Omit<Question, "groups">;
  /** Outcome values as fitted (1 = yes for two words, logs for a log form); NaN missing. */
  readonly outcome: Float64Array;
  readonly exposure: Exposure;
  /** By column: every covariate of every set, and every modifier. */
  readonly sources: ReadonlyMap<string, Source>;
  readonly sets: readonly (readonly string[])[];
  readonly reported: number;
  readonly weights: Float64Array | null;
  readonly cluster: Groups | null;
  readonly reportAt: Plan["reportAt"];
  readonly average: string | null;
  readonly findings: readonly Finding[];
}

const REFERENCE_NAMES = ["none", "no", "control", "placebo", "untreated", "baseline", "reference", "false", "0"];
const YES_NAMES = ["yes", "y", "true", "t", "1"];

/** Settles a plan that `findProblems` found nothing wrong with. */
export function resolveQuestion(table: Table, plan: Plan): Resolved {
  const findings: Finding[] = [];
  const outcome = resolveOutcome(table, plan, findings);
  const exposure = resolveExposure(table, plan);
  const sets = listSets(plan);
  const modifiers = [...new Set(plan.modifiers ?? sets.flat())];
  const sources = new Map<string, Source>();
  for (const name of new Set([...sets.flat(), ...modifiers, ...adjustmentColumns(plan)])) {
    if (!sets.some((s) => s.includes(name)) && !modifiers.includes(name)) continue;
    sources.set(
      name,
      resolveSource(
        table,
        name,
        plan.covariates?.find((c) => c.column === name),
        findings,
      ),
    );
  }
  if (modifiers.length === 0) findings.push({ code: "no-modifier" });
  const after = (plan.covariates ?? [])
    .filter((c) => c.timing === "after" && sets.some((s) => s.includes(c.column)))
    .map((c) => c.column);
  if (after.length > 0) findings.push({ code: "after-exposure", columns: after });
  const weights = plan.weights ? (findColumn(table, plan.weights) as { values: Float64Array }).values : null;
  const question: Omit<Question, "groups"> = {
    outcome: plan.outcome.column,
    outcomeKind: outcome.kind,
    outcomeForm: plan.outcome.form ?? "as is",
    exposure: plan.exposure.column,
    kind: exposure.kind,
    reference: exposure.kind === "groups" ? exposure.reference : null,
    per: exposure.kind === "amount" ? exposure.per : 1,
    design: plan.design ?? "observational",
    variance: resolveVariance(plan, outcome.kind, findings),
    level: plan.level ?? 0.95,
    margin: plan.margin ?? null,
    slopesAlpha: plan.slopesAlpha ?? 0.05,
    cluster: plan.cluster ?? null,
    weights: plan.weights ?? null,
    always: [...new Set(plan.always ?? [])],
    modifiers,
  };
  const cluster = plan.cluster ? asGroups(findColumn(table, plan.cluster)!) : null;
  return {
    question,
    outcome: outcome.values,
    exposure,
    sources,
    sets,
    reported: reportedSet(plan, sets),
    weights,
    cluster,
    reportAt: plan.reportAt,
    average: plan.average ?? null,
    findings,
  };
}

function resolveVariance(plan: Plan, kind: OutcomeKind, findings: Finding[]): Variance {
  const variance = plan.variance ?? (plan.cluster ? "CR2" : "HC3");
  if (plan.cluster && variance !== "CR1" && variance !== "CR2")
    findings.push({ code: "clusters-ignored", cluster: plan.cluster });
  if (variance === "classical" && kind === "binary") {
    // The variance of a proportion changes with it: equal spread cannot hold.
    findings.push({ code: "classical-binary" });
    return "HC3";
  }
  if (variance === "classical" && plan.weights) findings.push({ code: "classical-weights", weights: plan.weights });
  return variance;
}

function resolveOutcome(table: Table, { outcome }: Plan, findings: Finding[]): { values: Float64Array; kind: OutcomeKind } {
  const column = findColumn(table, outcome.column)!;
  if (!isAmount(column)) {
    const yesAt = column.levels.findIndex((level) => YES_NAMES.includes(level.toLowerCase()));
    const yes = yesAt >= 0 ? yesAt : column.levels.length - 1;
    findings.push({ code: "two-valued-outcome", yes: column.levels[yes], no: column.levels[1 - yes] ?? "" });
    return { values: Float64Array.from(column.codes, (code) => (code < 0 ? NaN : code === yes ? 1 : 0)), kind: "binary" };
  }
  if (outcome.form === "log")
    return { values: logOf(table, column.name, column.values, findings), kind: outcome.kind ?? "amount" };
  const two = column.kind === "number" ? distinctValues(column.values, 2) : null;
  const kind = outcome.kind ?? (two?.length === 2 ? "binary" : "amount");
  if (kind === "count") findings.push({ code: "count-as-amount" });
  if (kind !== "binary" || two?.length !== 2) return { values: column.values, kind: kind === "binary" ? "amount" : kind };
  findings.push({ code: "two-valued-outcome", yes: String(two[1]), no: String(two[0]) });
  return { values: column.values.map((v) => (Number.isNaN(v) ? NaN : v === two[1] ? 1 : 0)), kind };
}

function resolveExposure(table: Table, { exposure }: Plan): Exposure {
  const column = findColumn(table, exposure.column)!;
  const kind = exposure.kind ?? (isGroupsByNature(column) ? "groups" : "amount");
  if (kind === "amount" && isAmount(column)) {
    return { kind, column: column.name, values: column.values, per: exposure.per ?? 1 };
  }
  const groups = asGroups(column);
  const stated = exposure.reference === undefined ? null : String(exposure.reference);
  return { kind: "groups", column: column.name, groups, reference: stated ?? referenceOf(groups, isAmount(column)) };
}

/** METHODS 2: the one level with a reference's name, else the most frequent, ties in natural order. */
function referenceOf({ levels, codes }: Groups, numeric: boolean): string {
  const named = levels.filter((level) => REFERENCE_NAMES.includes(level.toLowerCase()));
  if (named.length === 1) return named[0];
  const counts = new Array<number>(levels.length).fill(0);
  for (const code of codes) if (code >= 0) counts[code]++;
  const order = levels
    .map((_, i) => i)
    .sort(
      (a, b) => counts[b] - counts[a] || (numeric ? Number(levels[a]) - Number(levels[b]) : naturalCompare(levels[a], levels[b])),
    );
  return levels[order[0]] ?? "";
}

function resolveSource(table: Table, name: string, stated: Covariate | undefined, findings: Finding[]): Source {
  const column = findColumn(table, name)!;
  const form = stated?.form ?? (isAmount(column) ? "as is" : "category");
  if (form === "category" || !isAmount(column)) {
    return {
      kind: "category",
      column: name,
      groups: asGroups(column),
      reference: stated?.reference === undefined ? null : String(stated.reference),
    };
  }
  if (form !== "log") return { kind: "amount", column: name, form, values: column.values };
  // Values ≤ 0 have no logarithm: they count as missing; the basis takes the logarithm.
  logOf(table, name, column.values, findings);
  return { kind: "amount", column: name, form, values: column.values.map((v) => (v > 0 ? v : NaN)) };
}

function logOf(table: Table, column: string, values: Float64Array, findings: Finding[]): Float64Array {
  const lines: number[] = [];
  const logs = values.map((value, i) => {
    if (value > 0 || Number.isNaN(value)) return Math.log(value);
    lines.push(table.lines[i]);
    return NaN;
  });
  if (lines.length > 0) findings.push({ code: "log-not-positive", column, lines });
  return logs;
}
