import type { Plan } from "../engine/plan";
import type { Compute } from "./worker/client";
import type { Stamp } from "./worker/messages";

/** A question held in memory instead of in a plan file. */
export interface Chosen {
  readonly plan: Plan;
  readonly guessed: boolean;
}

/** Text of the plan file the session was opened from. */
export interface PlanText {
  readonly text: string;
  readonly file: string;
}

/** The followed CSV as the session sees it. */
export interface Followed {
  accept(stamp: Stamp): void;
  stands(stamp: Stamp | null): boolean;
  quiet(): number;
  afresh(): void;
}

export interface SessionParts {
  /** What the worker keeps the comparison under; no two sessions share it. */
  readonly target: string;
  readonly csv: { readonly path: string; readonly file: string };
  readonly compute: Compute;
  readonly followed: Followed;
  readonly planText: PlanText | null;
  readonly chosen: Chosen | null;
  /** Called whenever `state()` has changed. */
  readonly changed: () => void;
  readonly missingText: (file: string) => string;
  readonly log: (text: string) => void;
}
