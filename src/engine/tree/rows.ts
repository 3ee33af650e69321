import { addLeverage, finishOne, finishOneShift, leafOne, leafOneShift, takeOut } from "./kernels";
import type { Found, One } from "./kernels";
import { finishMany } from "./many";
import type { Meat, Node, Program, RowSource, Sums } from "./types";

/** Rows worked on at a time: the levels of the tree then stay in the second-level cache. */
const BLOCK = 256;
/** Blocks between two looks at the cancel flag. */
const BLOCKS_A_LOOK = 8;

/**
 * Adds the sums of every model over the rows `from` … `to`: each block of rows is carried down the tree once, a column at a time, so that a
 * model costs about three multiplications of a column (20 operations a row), however many columns it has.
 * @param stop looked at between blocks; may throw
 */
export function walkRows(
  program: Program,
  source: RowSource,
  kind: Meat,
  from: number,
  to: number,
  sums: Sums,
  stop: () => void,
): void {
  const { columns, targets: q, depth } = program;
  const level = (columns.length + 2) * BLOCK;
  const w = new Float64Array((depth + 1) * level + (q + 3) * BLOCK);
  const walk: Walk = { w, level, outcome: columns.length * BLOCK, room: (depth + 1) * level, q, kind, base: source.base, sums };
  const roots = source.weights ? new Float64Array(BLOCK) : null;
  for (let start = from, count = 0; start < to; start += BLOCK, count++) {
    if (count % BLOCKS_A_LOOK === 0) stop();
    const height = Math.min(BLOCK, to - start);
    if (roots) for (let i = 0; i < height; i++) roots[i] = Math.sqrt(source.weights![start + i]);
    source.columns.forEach((column, slot) => load(w, slot * BLOCK, column, start, height, 1 / program.scale[slot], roots));
    w.fill(0, (columns.length + 1) * BLOCK, (columns.length + 1) * BLOCK + height);
    for (const node of program.nodes) visit(walk, node, start, height);
  }
}

interface Walk {
  readonly w: Float64Array;
  /** Length of a level: its columns, the outcome, the leverages. */
  readonly level: number;
  /** Where the outcome stands in a level. */
  readonly outcome: number;
  readonly room: number;
  readonly q: number;
  readonly kind: Meat;
  readonly base: readonly Float64Array[] | null;
  readonly sums: Sums;
}

function load(
  w: Float64Array,
  at: number,
  column: Float64Array,
  start: number,
  height: number,
  factor: number,
  roots: Float64Array | null,
): void {
  if (roots) for (let i = 0; i < height; i++) w[at + i] = column[start + i] * factor * roots[i];
  else for (let i = 0; i < height; i++) w[at + i] = column[start + i] * factor;
}

const found: Found = { meat: 0, shift: 0, gap: 0 };

function visit(walk: Walk, node: Node, start: number, height: number): void {
  const { w, level, outcome, q, kind, base, sums } = walk;
  const above = (node.depth - 1) * level;
  const here = node.depth * level;
  const x = above + node.take * BLOCK;
  const leverage = outcome + BLOCK;
  const { finish } = node;
  const single = q === 1 && kind === "HC3";
  if (node.leaf && finish && single) {
    const one = oneAt(above, outcome, finish.shares[1], finish.inverse[0]);
    // a leaf's slots are the target and the outcome
    const [shareTarget, shareOutcome] = node.shares;
    found.gap = sums.gap[finish.model];
    if (base) leafOneShift(w, x, node.inverse, shareTarget, shareOutcome, one, height, found, finish.weights[0], base[0], start);
    else leafOne(w, x, node.inverse, shareTarget, shareOutcome, one, height, found);
    settle(sums, finish.model, base !== null);
    return;
  }
  for (let k = 0; k < node.slots.length; k++) {
    const slot = node.slots[k] * BLOCK;
    takeOut(w, here + slot, above + slot, x, node.shares[k], height);
  }
  addLeverage(w, here + leverage, above + leverage, x, node.inverse, height);
  if (!finish) return;
  if (single) {
    const one = oneAt(here, outcome, finish.shares[1], finish.inverse[0]);
    found.gap = sums.gap[finish.model];
    if (base) finishOneShift(w, one, height, found, finish.weights[0], base[0], start);
    else finishOne(w, one, height, found);
    settle(sums, finish.model, base !== null);
    return;
  }
  const targets = Array.from({ length: q }, (_, a) => here + outcome - (q - a) * BLOCK);
  const place = { w, targets, outcome: here + outcome, leverage: here + leverage, room: walk.room, stride: BLOCK, height };
  finishMany(place, finish, kind, base, start, sums);
}

function oneAt(at: number, outcome: number, share: number, inverse: number): One {
  return { target: at + outcome - BLOCK, outcome: at + outcome, leverage: at + outcome + BLOCK, share, inverse };
}

function settle(sums: Sums, model: number, shift: boolean): void {
  sums.meat[model] += found.meat;
  sums.gap[model] = found.gap;
  if (shift) sums.shift[model] += found.shift;
}
