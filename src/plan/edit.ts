import type { Plan } from "../engine/plan";
import { parsePlan } from "./parse";
import { splice } from "./splice";
import { same, stepsBetween } from "./steps";
import { writeValue } from "./write";

/**
 * The text of a plan file after the plan in it has become another: what both have stays letter for letter, with formatting, comments, the
 * order of keys and a `$schema`. A comment goes only with the value it stands in. The text itself where nothing changes; null where it is
 * no plan, so that there is nothing to keep.
 */
export function editPlan(text: string, plan: Plan): string | null {
  const mark = text.startsWith("\uFEFF") ? "\uFEFF" : "";
  const plain = text.slice(mark.length);
  const parsed = parsePlan(plain, "");
  if (!parsed.ok) return null;
  const edited = stepsBetween(parsed.plan, plan).reduce(splice, plain);
  const again = parsePlan(edited, "");
  return again.ok && same(again.plan, plan) ? mark + edited : null;
}

/** A new plan file's text: keys in DESIGN's order, two spaces a step. `data` is the path of the CSV relative to the plan, with /. */
export function planText(plan: Plan, data: string): string {
  return writeValue({ ...plan, data }, { end: "\n", step: "  ", indent: "" }, 0) + "\n";
}
