import type { RowTask } from "../engine/passes/types";

/** What the assistant's thread is sent: a task over shared memory, and where its sums go. */
export interface RowOrder {
  readonly task: RowTask;
  readonly into: readonly Float64Array[];
}

/** What the thread is started with: two shared Int32, the state and a flag that asks it to stop. */
export interface AssistantData {
  readonly control: SharedArrayBuffer;
}

/** Places in the control array. */
export const STATE = 0;
export const STOP = 1;

/** Values of the state. */
export const IDLE = 1;
export const WORKING = 2;
export const DONE = 3;
export const FAILED = 4;
