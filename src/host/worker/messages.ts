import type { Plan } from "../../engine/plan";
import type { QuestionState, SetFilter, SlopesChoice, SlopesSection } from "../../protocol";
import type { Presentation } from "../../report/presentation";

/** What `stat` says about a file, as far as two equal stamps mean the same bytes. */
export interface Stamp {
  readonly size: number;
  readonly mtimeMs: number;
  readonly ctimeMs: number;
  readonly ino: number;
}

/** Where a comparison takes its question from. */
export type Ask =
  /** A bare CSV: guess the columns. */
  | { readonly kind: "suggest" }
  /** A question held in memory; `orSuggest` falls back to a guess where it does not fit the file. */
  | { readonly kind: "plan"; readonly plan: Plan; readonly guessed: boolean; readonly orSuggest: boolean }
  /** The text of a plan file, so that a problem can name its line. */
  | { readonly kind: "text"; readonly text: string; readonly file: string };

export interface CompareRequest {
  readonly type: "compare";
  readonly id: number;
  /** Whose comparison is kept for later presenting and copying. */
  readonly session: string;
  /** One Int32: not 0 asks the run to stop. */
  readonly cancel: SharedArrayBuffer;
  readonly path: string;
  /** The file's name as shown. */
  readonly file: string;
  readonly ask: Ask;
  readonly filter: SetFilter;
  /** False uses the columns of the last read, if there are any (a changed question on an unchanged file). */
  readonly reread: boolean;
  /** Fingerprint of the bytes already compared under this question; equal bytes answer "same". */
  readonly known: string | null;
}

export interface SlopesRequest {
  readonly type: "slopes";
  readonly id: number;
  readonly session: string;
  /** The comparison it is about, by the number of its run. */
  readonly of: number;
  readonly choice: SlopesChoice;
  /** One Int32: not 0 asks it to stop. */
  readonly cancel: SharedArrayBuffer;
}

export type ToWorker =
  | CompareRequest
  | SlopesRequest
  /** Other rows of the kept comparison. */
  | { readonly type: "present"; readonly id: number; readonly session: string; readonly filter: SetFilter }
  | {
      readonly type: "copy";
      readonly id: number;
      readonly session: string;
      readonly as: "markdown" | "table";
      readonly date: string;
    }
  | { readonly type: "forget"; readonly session: string };

/** One finished (or provisional) comparison, ready for the page. */
export interface Compared {
  /** Number of the run that made it, for later questions about it. */
  readonly run: number;
  readonly presentation: Presentation;
  readonly question: QuestionState;
  readonly guessed: boolean;
  readonly sha256: string;
  readonly stamp: Stamp;
  /** The file ends with a line break; one that used to and does not any more is probably still being written. */
  readonly ended: boolean;
  /** Milliseconds, for the log. */
  readonly took: { readonly read: number; readonly compare: number };
}

export type Outcome =
  | { readonly kind: "compared"; readonly result: Compared }
  | { readonly kind: "same"; readonly stamp: Stamp }
  | {
      readonly kind: "problem";
      readonly text: string;
      readonly line: number | null;
      readonly inPlan: boolean;
      /** The columns, where the file itself could be read. */
      readonly question: QuestionState | null;
      readonly stamp: Stamp | null;
    }
  /** No such file. */
  | { readonly kind: "gone" }
  /** The file changed while it was being read. */
  | { readonly kind: "torn" }
  | { readonly kind: "cancelled" }
  /** A fault of ours: the message goes to the log, a plain sentence to the panel. */
  | { readonly kind: "failed"; readonly text: string; readonly detail: string };

export type FromWorker =
  | { readonly type: "progress"; readonly id: number; readonly share: number }
  | { readonly type: "preview"; readonly id: number; readonly result: Compared }
  | { readonly type: "done"; readonly id: number; readonly outcome: Outcome }
  /** Answer to `present` and `copy`; null where nothing is kept for that session. */
  | { readonly type: "presented"; readonly id: number; readonly presentation: Presentation | null }
  | { readonly type: "text"; readonly id: number; readonly text: string | null }
  /** Null where that comparison is not kept any more, or the work was cancelled or failed; `detail` is a fault for the log. */
  | { readonly type: "slopes"; readonly id: number; readonly section: SlopesSection | null; readonly detail: string | null };
