import type { Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import type { Table } from "../engine/table";
import { profiles } from "./profile";
import type { Profile } from "./profile";

/** What a person has already said; the rest is guessed around it. */
export interface Stated {
  readonly outcome?: string;
  readonly exposure?: string;
  readonly covariates?: readonly string[];
  /** Columns with another role (weights, cluster, always adjusted for): not guessed. */
  readonly taken?: readonly string[];
}

const MOST_GROUPS = 6;
const MOST_COVARIATES = 4;
const MOST_LEVELS = 20;

/**
 * A first question for a table without a plan (DESIGN, "A bare CSV"): exposure the first column of two to six groups, outcome the last
 * amount, covariates the first four others. Never an identifier, a date, a constant, or a column with over half of its cells missing.
 * Without groups the first amount is the exposure; without amounts the last two-valued column is the outcome.
 */
export function suggestPlan(table: Table, stated: Stated = {}): { readonly plan: Plan } | { readonly problem: Problem } {
  const file = table.source.file;
  const taken = new Set([...(stated.taken ?? []), ...(stated.covariates ?? []), stated.outcome, stated.exposure]);
  const open = profiles(table).filter((profile) => isUsable(profile, table.rows) && !taken.has(profile.column.name));
  const groups = open.filter(({ distinct, numeric }) => distinct === 2 || (!numeric && distinct <= MOST_GROUPS));
  const amounts = open.filter(({ numeric, distinct }) => numeric && distinct > 2);
  const twoValued = open.filter(({ distinct }) => distinct === 2);
  const nameOf = (profile: Profile | undefined) => profile?.column.name;

  let exposure = stated.exposure ?? nameOf(groups[0]);
  const others = (list: readonly Profile[]) => list.filter(({ column }) => column.name !== exposure);
  const outcome = stated.outcome ?? nameOf(others(amounts).at(-1)) ?? nameOf(others(twoValued).at(-1));
  exposure ??= nameOf(amounts.find(({ column }) => column.name !== outcome));
  if (outcome === undefined) return { problem: { code: "no-outcome", file } };
  if (exposure === undefined) return { problem: { code: "no-exposure", file } };

  const covariates =
    stated.covariates ??
    open
      .filter(
        ({ column, numeric, distinct }) =>
          column.name !== exposure && column.name !== outcome && (numeric || distinct <= MOST_LEVELS),
      )
      .slice(0, MOST_COVARIATES)
      .map(({ column }) => column.name);
  return {
    plan: { outcome: { column: outcome }, exposure: { column: exposure }, covariates: covariates.map((column) => ({ column })) },
  };
}

function isUsable({ column, distinct, idLike, missing }: Profile, rows: number): boolean {
  return distinct > 1 && !idLike && column.kind !== "date" && missing * 2 <= rows;
}
