import type { Chosen, PlanText } from "./sessionParts";
import type { Ask } from "./worker/messages";

/**
 * Where a run takes its question from: what was chosen, else the plan file, else a guess. A guess, or a question remembered from another day,
 * gives way where it no longer fits the file.
 * @param fresh nothing has been compared yet
 */
export function askOf(chosen: Chosen | null, planText: PlanText | null, fresh: boolean): Ask {
  if (chosen) return { kind: "plan", ...chosen, orSuggest: !planText && (fresh || chosen.guessed) };
  return planText ? { kind: "text", ...planText } : { kind: "suggest" };
}
