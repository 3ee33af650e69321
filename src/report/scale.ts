import type { Question } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import { oneLine } from "./names";

/** Ratios beyond this, or below its inverse, are said and drawn as this: with an axis' room around them they stay in double range. */
const LARGEST = 1e280;

/** How estimates are said: as they are, in percentage points (two-valued outcome), or in percent (log outcome). */
export interface Scale {
  /** An estimate, interval end or shift on the scale that is printed. */
  show(value: number): number;
  /** A standard error near an estimate, on the printed scale (the delta method for percent): used for digits only. */
  showError(error: number | null, near: number): number | null;
  /** After a number in a sentence: "kWh per winter", "percentage points", "%". */
  readonly unit: string;
  /** In a table's head: "difference (kWh per winter)". */
  readonly head: string;
}

/** The scale of a question's readouts. */
export function scaleOf(question: Question, plan: Plan): Scale {
  const what = question.kind === "groups" ? "difference" : "slope";
  if (question.outcomeForm === "log") {
    return {
      show: (value) => Math.min(LARGEST, 100 * Math.expm1(value)),
      showError: (error, near) => (error === null ? null : Math.min(LARGEST, 100 * Math.exp(near) * error)),
      unit: "%",
      head: `${what} (percent)`,
    };
  }
  if (question.outcomeKind === "binary") {
    return {
      show: (v) => 100 * v,
      showError: (e) => (e === null ? null : 100 * e),
      unit: "percentage points",
      head: `${what} (percentage points)`,
    };
  }
  const unit = plan.outcome.unit ? oneLine(plan.outcome.unit) : "";
  return { show: (v) => v, showError: (e) => e, unit, head: unit ? `${what} (${unit})` : what };
}

/** How the outcome itself is said, apart from differences in it: in its own unit, percent of a two-valued one. */
export interface OutcomeScale extends Pick<Scale, "show" | "showError" | "unit"> {
  /** Drawn on a logarithmic axis, since the models are of the logarithm. */
  readonly log: boolean;
}

/** The scale of a question's outcome, from the values the models are fitted to. */
export function outcomeScaleOf(question: Question, plan: Plan): OutcomeScale {
  if (question.outcomeForm !== "log") {
    const { show, showError, unit } = scaleOf(question, plan);
    return { show, showError, unit: question.outcomeKind === "binary" ? "%" : unit, log: false };
  }
  const unit = plan.outcome.unit ? oneLine(plan.outcome.unit) : "";
  return {
    show: (value) => Math.min(LARGEST, Math.max(1 / LARGEST, Math.exp(value))),
    showError: (error, near) => (error === null ? null : Math.min(LARGEST, Math.exp(near) * error)),
    unit,
    log: true,
  };
}

/** "212 kWh per winter", "3.1 %", "4.2 percentage points", "212". */
export function withUnit(number: string, { unit }: Pick<Scale, "unit">): string {
  return unit === "" ? number : `${number} ${unit}`;
}
