import { compiledKernels } from "./compiled";
import { plainKernels } from "./plain";
import type { Kernels } from "./types";

export { writeOrders } from "./orders";
export { BLOCK, ORDER, RESULT } from "./types";
export type { Kernels, Order } from "./types";

let usual: Kernels | undefined;

/** The inner loops of this thread: the compiled ones where they run. One buffer, so one user at a time. */
export function kernels(): Kernels {
  return (usual ??= compiledKernels() ?? plainKernels());
}

/**
 * Copies a block's rows of a column into the buffer, multiplied by `factor`; the row after an odd number of them becomes zero.
 * @returns the even height that the loops take
 */
export function loadBlock(
  k: Kernels,
  w: Float64Array,
  at: number,
  column: Float64Array,
  start: number,
  height: number,
  factor = 1,
): number {
  w.set(column.subarray(start, start + height), at);
  const even = height + (height % 2);
  if (even > height) w[at + height] = 0;
  if (factor !== 1) k.times(at, at, factor, even);
  return even;
}
