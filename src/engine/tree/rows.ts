import { BLOCK, kernels as usualKernels, loadBlock, RESULT } from "../kernels";
import type { Kernels, Last } from "../kernels";
import { finishMany } from "./many";
import type { Meat, Node, Sums, WalkTask } from "./types";

/** Blocks between two looks at the cancel flag. */
const BLOCKS_A_LOOK = 8;

/** Lengths of the arrays of a walk's sums: meat, shift, gap. */
export function walkSizes({ program: { models, targets: q } }: WalkTask): number[] {
  return [(models * q * (q + 1)) / 2, models * q, models];
}

/**
 * Adds the sums of every model over a stretch of rows: each block of rows is carried down the tree once, a column at a time, so that a
 * model costs about three multiplications of a column (20 operations a row), however many columns it has.
 * @param into meat, shift and gap of `Sums`, zero at first
 * @param stop looked at between blocks; may throw
 * @param kernels the inner loops; by default the compiled ones where they run
 */
export function walkRows(
  task: WalkTask,
  into: readonly Float64Array[],
  stop: () => void,
  kernels: Kernels = usualKernels(),
): void {
  const { program, source, meat: kind, from, to } = task;
  const [meat, shift, gap] = into;
  const walk = layOut(task, { meat, shift, gap }, kernels);
  const { w, outcome } = walk;
  const lasts = program.nodes.map((node) => (program.targets === 1 && kind === "HC3" ? lastOf(node) : null));
  const roots = source.weights ? new Float64Array(BLOCK) : null;
  for (let start = from, count = 0; start < to; start += BLOCK, count++) {
    if (count % BLOCKS_A_LOOK === 0) stop();
    const height = Math.min(BLOCK, to - start);
    const even = height + (height % 2);
    if (roots) for (let i = 0; i < height; i++) roots[i] = Math.sqrt(source.weights![start + i]);
    source.columns.forEach((column, slot) => {
      loadBlock(kernels, w, slot * BLOCK, column, start, height, 1 / program.scale[slot]);
      if (roots) for (let i = 0; i < height; i++) w[slot * BLOCK + i] *= roots[i];
    });
    w.fill(0, outcome + BLOCK, outcome + 2 * BLOCK);
    source.base?.forEach((column, a) => loadBlock(kernels, w, walk.base![a], column, start, height));
    program.nodes.forEach((node, i) => visit(walk, node, lasts[i], even));
  }
}

/** The buffer: a level for each column taken (its columns, the outcome, the leverages), room to finish in, the base's influences, a result. */
interface Walk {
  readonly w: Float64Array;
  readonly kernels: Kernels;
  readonly level: number;
  /** Where the outcome stands in a level. */
  readonly outcome: number;
  readonly room: number;
  readonly base: readonly number[] | null;
  readonly result: number;
  readonly q: number;
  readonly kind: Meat;
  readonly sums: Sums;
}

function layOut({ program, source, meat: kind }: WalkTask, sums: Sums, kernels: Kernels): Walk {
  const { columns, targets: q, depth } = program;
  const level = (columns.length + 2) * BLOCK;
  const room = (depth + 1) * level;
  const base = source.base?.map((_, a) => room + (q + 3 + a) * BLOCK) ?? null;
  const result = room + (q + 3 + (base?.length ?? 0)) * BLOCK;
  const w = kernels.room(result + RESULT);
  return { w, kernels, level, outcome: columns.length * BLOCK, room, base, result, q, kind, sums };
}

/** For a node where a model with one target ends, under HC3; null for others. */
function lastOf({ inverse: inverseX, shares, finish }: Node): Last | null {
  if (!finish) return null;
  const [shareTarget, shareOutcome] = shares.subarray(shares.length - 2);
  return { inverseX, shareTarget, shareOutcome, share: finish.shares[1], inverse: finish.inverse[0] };
}

/** @param last where a model with one target ends here, under HC3 */
function visit(walk: Walk, node: Node, last: Last | null, height: number): void {
  const { kernels, level, outcome, q, kind } = walk;
  const above = (node.depth - 1) * level;
  const here = node.depth * level;
  const x = above + node.take * BLOCK;
  const { finish } = node;
  // one target's and the outcome's shares come last; a leaf has no others
  const others = last ? node.slots.length - 2 : node.slots.length;
  for (let k = 0; k < others; k++) {
    const slot = node.slots[k] * BLOCK;
    kernels.takeOut(here + slot, above + slot, x, node.shares[k], height);
  }
  if (last) {
    finishOne(walk, node, last, x, above + outcome - BLOCK, here + outcome - BLOCK, height);
    return;
  }
  const leverage = outcome + BLOCK;
  kernels.addLeverage(here + leverage, above + leverage, x, node.inverse, height);
  if (!finish) return;
  const { w, room, base, sums } = walk;
  const targets = Array.from({ length: q }, (_, a) => here + outcome - (q - a) * BLOCK);
  const place = { w, kernels, targets, outcome: here + outcome, leverage: here + leverage, room, stride: BLOCK, height };
  finishMany(place, finish, kind, base, sums);
}

function finishOne(walk: Walk, node: Node, last: Last, x: number, from: number, to: number, height: number): void {
  const { w, kernels, base, result, sums } = walk;
  const { model, weights } = node.finish!;
  w[result + 2] = 1 + sums.gap[model];
  if (base) {
    if (node.leaf) kernels.leafShift(x, from, last, weights[0], base[0], height, result);
    else kernels.stepShift(x, from, to, last, weights[0], base[0], height, result);
    sums.shift[model] += w[result + 1];
  } else if (node.leaf) kernels.leaf(x, from, last, height, result);
  else kernels.step(x, from, to, last, height, result);
  sums.meat[model] += w[result];
  sums.gap[model] = w[result + 2] - 1;
}
