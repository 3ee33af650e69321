import type { FactorTask } from "../linear/factorise";
import type { WalkTask } from "../tree/types";

/** A stretch of rows to be gone through, as plain data, so that another thread can do it. */
export type RowTask = FactorTask | WalkTask;

/** A second thread that takes half of a pass over the rows. */
export interface Assistant {
  /** Begins a task; null where it cannot (its arrays are not shared memory, the thread is busy or not there yet). */
  begin(task: RowTask): Begun | null;
}

export interface Begun {
  /** Waits for the task's arrays, as `doRows` fills them; null when the thread failed. */
  wait(): readonly Float64Array[] | null;
  /** Tells the thread to stop; its answer is not wanted. */
  drop(): void;
}

/**
 * Where the columns of a design live. Kept by the caller between comparisons, since the first touch of fresh memory is dear; shared where a
 * second thread is to read them.
 */
export interface RowMemory {
  /** n doubles, not necessarily zero, good until `reset`. */
  take(n: number): Float64Array;
  /** Everything taken is free again: called by `compare` as it begins. */
  reset(): void;
}

/** What a pass over the rows may use and must look at. */
export interface Passing {
  /** Asked between sets and blocks of rows; true stops the work with `Cancelled`. */
  readonly cancelled?: () => boolean;
  /** For the second half of the passes over many rows. */
  readonly assistant?: Assistant | null;
  /** Shared memory where there is an assistant. */
  readonly memory?: RowMemory;
}
