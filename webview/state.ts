import type { PanelState, PlanChange } from "../src/protocol";
import { readWanted } from "./slopes/wanted";
import type { Wanted } from "./slopes/wanted";

/** What the page keeps for itself across hiding and reloading: a hint only, the truth is the host's. */
export interface Kept {
  /** What the panel was opened from; the window asks for it when it comes back. */
  readonly target?: string;
  readonly scroll: number;
  /** Names of the folded pieces that are open. */
  readonly open: readonly string[];
  readonly slopes: Wanted;
}

export function readKept(value: unknown): Kept {
  const { target, scroll, open, slopes } = (typeof value === "object" && value !== null ? value : {}) as Record<string, unknown>;
  return {
    target: typeof target === "string" ? target : undefined,
    scroll: typeof scroll === "number" && scroll >= 0 ? scroll : 0,
    open: Array.isArray(open) ? open.filter((name) => typeof name === "string") : [],
    slopes: readWanted(slopes),
  };
}

/** The state as it will be, for lists a person may change twice before the host has answered once. */
export function foresee(state: PanelState, change: PlanChange): PanelState {
  if (change.key !== "covariates" || !state.question) return state;
  const { plan } = state.question;
  const covariates = change.columns.map((column) => plan.covariates?.find((item) => item.column === column) ?? { column });
  return { ...state, question: { ...state.question, plan: { ...plan, covariates } } };
}

/** What a screen reader is told of a run: its result, or why there is none; null while it lasts. */
export function announcement(state: PanelState): string | null {
  const { status, presentation, checking } = state;
  if (status.kind === "missing" || status.kind === "unusable") return status.text;
  return status.kind === "ready" && !checking ? (presentation?.summary ?? null) : null;
}
