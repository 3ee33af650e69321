import type { Plan } from "./engine/plan";
import type { PlanChange } from "./plan/change";
import type { Presentation } from "./report/presentation";
import type { Plot, SlopesChoice, SlopesSection } from "./report/slopes/presentation";

/**
 * The typed messages between the extension host and the panel's page: the only file both sides import.
 * The page asks first (`ready`) and always gets the whole state; it never computes a statistic or writes a sentence about one.
 */
export const PROTOCOL_VERSION = 1;

// — page → host —
export type PageMessage = { readonly v: typeof PROTOCOL_VERSION } & (
  | { readonly type: "ready" }
  /** A choice made in the Question section. */
  | { readonly type: "choose"; readonly change: PlanChange }
  /** Rows to list of a long table. */
  | { readonly type: "filter"; readonly filter: SetFilter }
  | { readonly type: "copy"; readonly id: number; readonly as: "markdown" | "table" }
  /** Save a bare CSV's question as a plan file. */
  | { readonly type: "savePlan" }
  /** Open the CSV (or the plan) at a line. */
  | { readonly type: "openLine"; readonly line: number; /** The line is one of the plan file. */ readonly inPlan?: boolean }
  /** Actions named on a status: choose another file, read again. */
  | { readonly type: "readAgain" }
  /** What the Slopes section shows; null when it was closed. */
  | { readonly type: "slopes"; readonly choice: SlopesChoice | null }
  /** Save a figure where a person says. */
  | { readonly type: "saveFigure"; readonly id: number; readonly figure: SavedFigure }
);

export type { PlanChange, Plot, SlopesChoice, SlopesSection };

/** A figure as a file: an SVG's text, or a PNG in base64. The name is what it shows, not yet a file's name. */
export interface SavedFigure {
  readonly as: "svg" | "png";
  readonly name: string;
  readonly data: string;
}

/** Sets that hold all of `holds` and none of `omits`; null asks for no extra rows. */
export type SetFilter = { readonly holds: readonly string[]; readonly omits: readonly string[] } | null;

// — host → page —
export type HostMessage = { readonly v: typeof PROTOCOL_VERSION } & (
  | { readonly type: "state"; readonly state: PanelState }
  /** Answer to a `copy`: what the panel says, or why it failed. */
  | { readonly type: "copied"; readonly id: number; readonly ok: boolean; readonly text: string }
  /** Answer to a `saveFigure`: where it went, or why it did not; "" where a person thought better of it. */
  | { readonly type: "saved"; readonly id: number; readonly ok: boolean; readonly text: string }
);

/** The whole truth the page renders. */
export interface PanelState {
  /** File name, e.g. "heating.csv". */
  readonly file: string;
  /** What the page was opened from, kept by the page for a reload: URI string of the CSV or plan. */
  readonly target: string;
  readonly keptIn: KeptIn;
  readonly status: Status;
  /** Null until the file has been read once. */
  readonly question: QuestionState | null;
  /** Null until something has been compared; kept on screen, marked old, while the status is not "ready". */
  readonly presentation: Presentation | null;
  /** True while errors and slopes tests of the shown presentation are still to come. */
  readonly checking: boolean;
  readonly reading: Reading | null;
  readonly filter: SetFilter;
  /**
   * The open Slopes section, always of the comparison in `presentation`: null while it is closed, and for the moment between a new result and
   * its figure.
   */
  readonly slopes: SlopesSection | null;
}

/** Where the question is kept. */
export interface KeptIn {
  /** Name of the plan file; null while there is none. */
  readonly plan: string | null;
  /** Why the question is in no file, or the file does not hold the last choice: one sentence; null where all is well. */
  readonly note: string | null;
}

export type Status =
  /** First read. */
  | { readonly kind: "reading" }
  /** Fresh. */
  | { readonly kind: "ready" }
  /** A newer file is being read; `share` is progress in [0, 1] or null. */
  | { readonly kind: "updating"; readonly share: number | null }
  /** The file is gone; the last result stays, marked old. */
  | { readonly kind: "missing"; readonly text: string }
  /** The file or plan cannot be used: one sentence; `line` can be opened. */
  | { readonly kind: "unusable"; readonly text: string; readonly line: number | null; readonly inPlan: boolean };

export interface Reading {
  readonly number: number;
  /** ISO time. */
  readonly at: string;
}

export interface QuestionState {
  readonly plan: Plan;
  /** True until a person has chosen one of the columns. */
  readonly guessed: boolean;
  readonly columns: readonly ColumnInfo[];
  /** Levels of the exposure, when it is groups, the present reference marked. */
  readonly levels: readonly string[];
  readonly reference: string | null;
  readonly kind: "groups" | "amount";
  readonly setsChoice: "each" | "steps" | "every" | "list";
  readonly setCount: number;
}

export interface ColumnInfo {
  readonly name: string;
  readonly kind: "number" | "date" | "category" | "yes/no" | "text";
  /** Missing cells. */
  readonly missing: number;
  /** Distinct levels of a category; null for numbers. */
  readonly levels: number | null;
  /** Why the column cannot stand in a role, as a short phrase; null where it can. */
  readonly notOutcome: string | null;
  readonly notExposure: string | null;
  readonly notCovariate: string | null;
}
