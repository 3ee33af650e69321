import type { Plan } from "../engine/plan";
import { applyChange } from "../plan/change";
import { parsePlan } from "../plan/parse";
import { same } from "../plan/steps";
import type { PlanChange, QuestionState } from "../protocol";
import { settlesGuess } from "./choose";
import type { Chosen, PlanText } from "./sessionParts";
import type { Ask } from "./worker/messages";

/** Where a session takes its question from: what was chosen, else the plan file, else a guess. */
export class Asked {
  /** Until the first result: a remembered question may still give way. */
  private fresh = true;

  constructor(
    private planText: PlanText | null,
    private chosen: Chosen | null,
  ) {}

  /** True where something is asked that stands in no plan file. */
  get apart(): Chosen | null {
    return this.chosen;
  }

  /** The plan file's text as it was last read or written. */
  get text(): string | null {
    return this.planText?.text ?? null;
  }

  /** A guess, or a question remembered from another day, gives way where it no longer fits the file. */
  ask(): Ask {
    const { chosen, planText } = this;
    if (chosen) return { kind: "plan", ...chosen, orSuggest: !planText && (this.fresh || chosen.guessed) };
    return planText ? { kind: "text", ...planText } : { kind: "suggest" };
  }

  choose({ plan, guessed }: QuestionState, change: PlanChange): Chosen {
    this.fresh = false;
    return (this.chosen = { plan: applyChange(plan, change), guessed: guessed && !settlesGuess(change) });
  }

  /**
   * The plan file's text, newly read or just written: it replaces what was chosen over another text.
   * @returns whether it asks something else than was asked so far; an echo of our own writing, or another layout, does not
   */
  planChanged(text: PlanText, chosen: Chosen | null): boolean {
    const before = this.plan();
    this.planText = text;
    this.chosen = chosen;
    return !same(before, this.plan());
  }

  /** The question as a run took it, held on to where no plan file does. */
  took(plan: Plan, guessed: boolean): void {
    if (this.chosen || !this.planText) this.chosen = { plan, guessed };
  }

  settled(): void {
    this.fresh = false;
  }

  private plan(): Plan | null {
    if (this.chosen || !this.planText) return this.chosen?.plan ?? null;
    const parsed = parsePlan(this.planText.text, this.planText.file);
    return parsed.ok ? parsed.plan : null;
  }
}
