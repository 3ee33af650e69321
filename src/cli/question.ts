import type { Problem } from "../engine/findings";
import type { Covariate, Plan } from "../engine/plan";
import type { Table } from "../engine/table";
import { applyChange } from "../plan/change";
import type { ParsedPlan } from "../plan/parse";
import { suggestPlan } from "../plan/suggest";
import type { Arguments } from "./arguments";
import { Refusal } from "./refusal";
import { say } from "./sentences";

type Values = Arguments["values"];

/** The question a command line asks. */
export interface Question {
  readonly plan: Plan;
  /** Every column was guessed: none was named. */
  readonly guessed: boolean;
  /** Columns guessed beside ones that were named, by role. */
  readonly filledIn: readonly string[];
}

/** The plan with the options over it; without a plan, what the options leave open is guessed from the table. */
export function questionOf(table: Table, values: Values, parsed: ParsedPlan | null): Question | { readonly problem: Problem } {
  const outcome = text(values, "outcome");
  const exposure = text(values, "exposure");
  const covariates = list(values, "covariates");
  if (parsed)
    return { plan: withOptions(withColumns(parsed.plan, outcome, exposure, covariates), values), guessed: false, filledIn: [] };

  const taken = [text(values, "cluster"), text(values, "weights"), ...(list(values, "always") ?? [])].filter(
    (name) => name !== undefined,
  );
  const suggested = suggestPlan(table, { outcome, exposure, covariates, taken });
  if ("problem" in suggested) return suggested;
  const { plan } = suggested;
  const guessed = outcome === undefined && exposure === undefined && covariates === undefined;
  const filledIn: string[] = [];
  if (!guessed) {
    if (outcome === undefined) filledIn.push(`outcome ${plan.outcome.column}`);
    if (exposure === undefined) filledIn.push(`exposure ${plan.exposure.column}`);
    const names = (plan.covariates ?? []).map(({ column }) => column);
    if (covariates === undefined) filledIn.push(names.length > 0 ? `covariates ${names.join(", ")}` : "no covariates");
  }
  return { plan: withOptions(plan, values), guessed, filledIn };
}

/** Other columns in the plan's roles. One column for both outcome and exposure is left to be found as a problem, not put right by a swap. */
function withColumns(plan: Plan, outcome?: string, exposure?: string, covariates?: readonly string[]): Plan {
  const wanted = { outcome: outcome ?? plan.outcome.column, exposure: exposure ?? plan.exposure.column };
  let next: Plan;
  if (wanted.outcome === wanted.exposure)
    next = { ...plan, outcome: { column: wanted.outcome }, exposure: { column: wanted.exposure } };
  else {
    next = applyChange(plan, { key: "exposure", column: wanted.exposure });
    next = applyChange(next, { key: "outcome", column: wanted.outcome });
  }
  return covariates ? applyChange(next, { key: "covariates", columns: covariates }) : next;
}

function withOptions(plan: Plan, values: Values): Plan {
  const word = (name: string) => text(values, name) as never;
  const sets = text(values, "sets") as "each" | "steps" | "every" | undefined;
  const next = sets ? applyChange(plan, { key: "sets", sets }) : plan;
  const changed: Plan = {
    ...next,
    ...given({
      always: list(values, "always"),
      report: list(values, "report"),
      modifiers: list(values, "modifiers"),
      margin: number(values, "margin"),
      slopesAlpha: number(values, "slopes-alpha"),
      cluster: text(values, "cluster"),
      weights: text(values, "weights"),
      variance: word("variance"),
      level: number(values, "level"),
      missing: list(values, "missing"),
    }),
    outcome: { ...next.outcome, ...given({ kind: word("outcome-kind") }) },
    exposure: {
      ...next.exposure,
      ...given({ kind: word("exposure-kind"), reference: text(values, "reference"), per: number(values, "per") }),
    },
  };
  return (list(values, "category") ?? []).reduce(asCategory, changed);
}

function asCategory(plan: Plan, column: string): Plan {
  const covariates = plan.covariates ?? [];
  const category = (covariate: Covariate): Covariate => ({ ...covariate, form: "category" });
  if (covariates.some((covariate) => covariate.column === column))
    return {
      ...plan,
      covariates: covariates.map((covariate) => (covariate.column === column ? category(covariate) : covariate)),
    };
  if (plan.always?.includes(column)) return { ...plan, covariates: [...covariates, category({ column })] };
  throw new Refusal(say.categoryOutside(column));
}

/** The entries that are there, so that an option not given overrides nothing. */
function given<T extends object>(entries: T): Partial<T> {
  return Object.fromEntries(Object.entries(entries).filter(([, value]) => value !== undefined)) as Partial<T>;
}

const text = (values: Values, name: string) => values.get(name) as string | undefined;
const number = (values: Values, name: string) => values.get(name) as number | undefined;
const list = (values: Values, name: string) => values.get(name) as readonly string[] | undefined;
