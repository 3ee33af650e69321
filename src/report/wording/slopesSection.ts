import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { columnName, listed } from "../names";

/** The Slopes section's finding in one line, of the reported set: "slopes differ in floor_m2 for the reported set". */
export function saySlopesSummary({ sets, reported, question }: Comparison, plan: Plan, checking: boolean): string {
  const set = sets[reported];
  if (question.modifiers.length === 0) return "no modifier was tested";
  if (set.contrasts.every((contrast) => contrast.readout.kind === "none")) return "nothing to compare in the reported set";
  const differing = set.slopes.filter((test) => test.verdict === "differ").map((test) => columnName(test.modifier, plan));
  if (differing.length > 0) return `slopes differ in ${listed(differing)} for the reported set`;
  if (checking) return "checking";
  return set.slopes.every((test) => test.verdict === "agree")
    ? `slopes agree in ${listed(set.slopes.map((test) => columnName(test.modifier, plan)))} for the reported set`
    : "slopes not shown to differ or agree for the reported set";
}
