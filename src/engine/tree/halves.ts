import { walkRows } from "./rows";
import type { Meat, Program, RowSource, Sums } from "./types";

/** Rows are cut at a multiple of this. */
const BLOCK = 256;
/** From this many rows on the sums are made in two halves, whether or not two threads work on them: the result must not depend on the machine. */
const TWO_HALVES = 50_000;

/** The second half of a pass, as plain data over shared memory. */
export interface HalfTask {
  readonly program: Program;
  readonly source: RowSource;
  readonly kind: Meat;
  readonly from: number;
  readonly to: number;
}

/** A second thread that takes half of a pass over the rows. */
export interface Assistant {
  /**
   * Begins a task; null where it cannot (its arrays are not shared, the thread is not there yet).
   * The answer waits for the sums; null when the thread failed. `drop` tells it to stop.
   */
  begin(task: HalfTask): { readonly wait: () => Sums | null; readonly drop: () => void } | null;
}

/** Where a pass over n rows is cut, free of the machine; n where it is not. */
export function middleOf(n: number): number {
  return n < TWO_HALVES ? n : Math.ceil(n / 2 / BLOCK) * BLOCK;
}

/** The sums over all rows. @param stop looked at between blocks; may throw */
export function walkInHalves(
  program: Program,
  source: RowSource,
  kind: Meat,
  stop: () => void,
  assistant: Assistant | null,
): Sums {
  const { n } = source;
  const middle = middleOf(n);
  const first = emptySums(program);
  if (middle === n) {
    walkRows(program, source, kind, 0, n, first, stop);
    return first;
  }
  const begun = assistant?.begin({ program, source, kind, from: middle, to: n }) ?? null;
  try {
    walkRows(program, source, kind, 0, middle, first, stop);
  } catch (error) {
    begun?.drop();
    throw error;
  }
  const second = begun?.wait() ?? walkSecond(program, source, kind, middle, stop);
  for (let i = 0; i < first.meat.length; i++) first.meat[i] += second.meat[i];
  for (let i = 0; i < first.shift.length; i++) first.shift[i] += second.shift[i];
  for (let i = 0; i < first.gap.length; i++) first.gap[i] = Math.min(first.gap[i], second.gap[i]);
  return first;
}

function walkSecond(program: Program, source: RowSource, kind: Meat, middle: number, stop: () => void): Sums {
  const sums = emptySums(program);
  walkRows(program, source, kind, middle, source.n, sums, stop);
  return sums;
}

export function emptySums({ models, targets: q }: Program): Sums {
  return {
    meat: new Float64Array((models * q * (q + 1)) / 2),
    shift: new Float64Array(models * q),
    gap: new Float64Array(models).fill(1),
  };
}
