import type { DrawnRows } from "./types";

/** Points a plot can carry and a person can tell apart. */
export const DRAWN_ROWS = 2000;

/** What rows are drawn from: all of length n, `group` null for one group. */
export interface RowSource {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly lines: ArrayLike<number>;
  readonly group: Int32Array | null;
}

/**
 * Rows to draw: all up to 2,000, beyond that every so-and-so-many-th of each group in file order, so that every group keeps its share. The same
 * rows each time.
 */
export function drawnRows({ x, y, lines, group }: RowSource): DrawnRows {
  const order = byGroup(group, x.length);
  const count = Math.min(DRAWN_ROWS, order.length);
  const taken = Array.from({ length: count }, (_, k) => order[Math.floor(((k + 0.5) * order.length) / count)]);
  return {
    group: taken.map((row) => group?.[row] ?? 0),
    x: taken.map((row) => x[row]),
    y: taken.map((row) => y[row]),
    lines: taken.map((row) => lines[row]),
    of: order.length,
  };
}

/** Rows ordered by group, in file order within each. */
function byGroup(group: Int32Array | null, n: number): Int32Array {
  const order = Int32Array.from({ length: n }, (_, i) => i);
  if (!group) return order;
  let groups = 0;
  for (const code of group) groups = Math.max(groups, code + 1);
  const next = new Int32Array(groups + 1);
  for (const code of group) next[code + 1]++;
  for (let g = 0; g < groups; g++) next[g + 1] += next[g];
  for (let i = 0; i < n; i++) order[next[group[i]]++] = i;
  return order;
}
