import type { Comparison, ContrastResult, Estimate } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { decimalsFor, exactly, fixed, levelName } from "../digits";
import { columnName, listed, word } from "../names";
import { scaleOf, withUnit } from "../scale";
import type { Scale } from "../scale";

/** What the sentences of one contrast share. */
export interface Voice {
  readonly comparison: Comparison;
  readonly plan: Plan;
  readonly scale: Scale;
  readonly outcome: string;
  readonly exposure: string;
  readonly contrast: ContrastResult;
}

export function voiceOf(comparison: Comparison, plan: Plan, contrast: ContrastResult): Voice {
  return {
    comparison,
    plan,
    scale: scaleOf(comparison.question, plan),
    outcome: columnName(plan.outcome.column, plan),
    exposure: columnName(plan.exposure.column, plan),
    contrast,
  };
}

/** "Holding floor_m2 and tenure fixed", or "Unadjusted". */
export function holding(adjustedFor: readonly string[], plan: Plan): string {
  return adjustedFor.length === 0 ? "Unadjusted" : `Holding ${listed(adjustedFor.map((c) => columnName(c, plan)))} fixed`;
}

/** "for retrofit = full than for none", or "per 10 more of dose". */
export function comparedGroups({ comparison, exposure, contrast }: Voice): string {
  const { question } = comparison;
  if (question.kind === "amount") return `per ${exactly(question.per)} more of ${exposure}`;
  return `for ${exposure} = ${word(contrast.level!)} than for ${word(question.reference!)}`;
}

/** "no single difference": what stands where slopes differ, instead of a number. */
export function noSingle({ kind }: Comparison["question"]): string {
  return `no single ${kind === "groups" ? "difference" : "slope"}`;
}

/** Decimals at which an estimate with its error is said. */
export function decimalsOf({ scale }: Voice, { estimate, standardError }: Pick<Estimate, "estimate" | "standardError">): number {
  return decimalsFor([scale.showError(standardError, estimate)], scale.show(estimate));
}

/** "212 kWh per winter lower", "no different (0.0)" where that is what the digits show. */
export function direction({ scale }: Voice, value: number, decimals: number): string {
  const shown = scale.show(value);
  const text = fixed(Math.abs(shown), decimals);
  if (Number(text.replaceAll(",", "")) === 0) return `no different (${withUnit(text, scale)})`;
  return `${withUnit(text, scale)} ${shown < 0 ? "lower" : "higher"}`;
}

/** "160 to 264 lower", "12 lower to 40 higher". */
export function range({ scale }: Voice, [low, high]: readonly [number, number], decimals: number): string {
  const [a, b] = [scale.show(low), scale.show(high)];
  const text = (v: number) => fixed(Math.abs(v), decimals);
  if (a >= 0 && b >= 0) return `${text(a)} to ${text(b)} higher`;
  if (a <= 0 && b <= 0) return `${text(b)} to ${text(a)} lower`;
  return `${text(a)} lower to ${text(b)} higher`;
}

/** "(95 % interval 160 to 264 lower)", or why there is none. */
export function intervalPhrase(voice: Voice, estimate: Pick<Estimate, "interval">, decimals: number): string {
  if (!estimate.interval) return "(no interval can be computed)";
  return `(${levelName(voice.comparison.question.level)} interval ${range(voice, estimate.interval, decimals)})`;
}
