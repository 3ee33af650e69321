import { stopIf } from "../cancelled";
import { factorRows, factorSizes } from "../linear/factorise";
import { walkRows, walkSizes } from "../tree/rows";
import type { Passing, RowTask } from "./types";

/** Rows are cut at a multiple of this, the height of a block. */
const BLOCK = 256;
/** From this many rows on a pass is made in two halves, whether or not two threads work on them: the result must not depend on the machine. */
export const MANY_ROWS = 50_000;

/** The first half is a little more than the second, which another thread begins later. */
const FIRST_SHARE = 0.53;

/** Lengths of the arrays that a task fills. */
export function sizesOf(task: RowTask): number[] {
  return task.kind === "factor" ? factorSizes(task) : walkSizes(task);
}

/** Does a task, adding to arrays of the sizes that `sizesOf` gives, zero at first. @param stop looked at between blocks; may throw */
export function doRows(task: RowTask, into: readonly Float64Array[], stop: () => void): void {
  if (task.kind === "factor") factorRows(task, into, stop);
  else walkRows(task, into, stop);
}

/**
 * A pass over n rows, in two halves where there are many: the second by the assistant, if there is one and it can.
 * @returns the arrays of each half, to be put together by the caller
 * @throws Cancelled
 */
export function inHalves(
  n: number,
  taskFor: (from: number, to: number) => RowTask,
  { cancelled, assistant }: Passing,
): (readonly Float64Array[])[] {
  const stop = () => stopIf(cancelled);
  const alone = (task: RowTask) => {
    const into = sizesOf(task).map((size) => new Float64Array(size));
    doRows(task, into, stop);
    return into;
  };
  if (n < MANY_ROWS) return [alone(taskFor(0, n))];
  const middle = Math.ceil((n * FIRST_SHARE) / BLOCK) * BLOCK;
  const rest = taskFor(middle, n);
  const begun = assistant?.begin(rest) ?? null;
  try {
    const first = alone(taskFor(0, middle));
    return [first, begun?.wait() ?? alone(rest)];
  } catch (error) {
    begun?.drop();
    throw error;
  }
}
